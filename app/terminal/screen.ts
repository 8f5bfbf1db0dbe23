import { writeReason } from '../files/write-reason.ts';
import { EXIT } from './refusal.ts';

/** Where a command speaks: results on one stream, everything else on the other. Handed in, so that tests can listen. */
export type Screen = {
  /** Results: what a pipe or a file gets. */
  readonly out: (text: string) => void;
  /** Notes and refusals. */
  readonly note: (text: string) => void;
  /** Puts a short text in the place of the line that a person watches. */
  readonly redraw: (text: string) => void;
  /** Whether notes go to a person at a terminal: progress is drawn only there. */
  readonly isWatched: boolean;
};

/**
 * Names and titles come from files, which may come from anyone, and a terminal obeys control characters: they are written as
 * JSON writes them, so that JSON says the same as before.
 */
export const harmless = (text: string): string =>
  text.replace(
    /(?!\n|\t|\r\n)[\p{Cc}\p{Bidi_Control}]/gu,
    (mark) => `\\u${mark.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );

/** The two standard streams. A reader that goes away early (`| head`) ends the program quietly. */
export function standardScreen(): Screen {
  for (const stream of [process.stdout, process.stderr]) {
    stream.on('error', (error: NodeJS.ErrnoException) => {
      if (error.code === 'EPIPE') process.exit(process.exitCode ?? 0);
      if (stream === process.stdout)
        process.stderr.write(
          `shadewright: the results were not written, ${writeReason(error)}; send them elsewhere.\n`,
        );
      process.exit(EXIT.refused);
    });
  }
  return {
    out: (text) => void process.stdout.write(harmless(text)),
    note: (text) => void process.stderr.write(harmless(text)),
    redraw: (text) => void process.stderr.write(`\r${harmless(text)}\u001b[K`),
    isWatched: process.stderr.isTTY === true,
  };
}
