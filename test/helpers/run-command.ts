import { spawn } from 'node:child_process';
import { resolve } from 'node:path';

const COMMAND = resolve(import.meta.dirname, '../../out/main/cli.js');

export type Ran = {
  readonly status: number | null;
  readonly out: string;
  readonly err: string;
};

/** Runs the built command as a user would, in a folder; one that hangs is killed and has status null. */
export function runCommand(
  words: readonly string[],
  folder: string,
  env: Record<string, string> = {},
  most_ms = 60_000,
): Promise<Ran> {
  const { SHADEWRIGHT_DEBUG: _, ...inherited } = process.env;
  return new Promise((settle) => {
    const child = spawn(process.execPath, [COMMAND, ...words], {
      cwd: folder,
      env: { ...inherited, ...env },
      timeout: most_ms,
      killSignal: 'SIGKILL',
    });
    let out = '';
    let err = '';
    child.stdout.setEncoding('utf8').on('data', (text: string) => (out += text));
    child.stderr.setEncoding('utf8').on('data', (text: string) => (err += text));
    child.on('close', (status) => settle({ status, out, err }));
  });
}
