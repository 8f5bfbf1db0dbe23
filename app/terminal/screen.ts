/** Where a command speaks: results on one stream, everything else on the other. Handed in, so that tests can listen. */
export type Screen = {
  /** Results: what a pipe or a file gets. */
  readonly out: (text: string) => void;
  /** Notes, progress and refusals. */
  readonly note: (text: string) => void;
  /** Whether notes go to a person at a terminal: progress is drawn only there. */
  readonly isWatched: boolean;
};

/** The two standard streams. A reader that goes away early (`| head`) ends the program quietly. */
export function standardScreen(): Screen {
  for (const stream of [process.stdout, process.stderr]) {
    stream.on('error', (error: NodeJS.ErrnoException) => {
      if (error.code !== 'EPIPE') throw error;
      process.exit(process.exitCode ?? 0);
    });
  }
  return {
    out: (text) => void process.stdout.write(text),
    note: (text) => void process.stderr.write(text),
    isWatched: process.stderr.isTTY === true,
  };
}
