import { stat } from 'node:fs/promises';
import { resolve } from 'node:path';
import { Refusal } from './refusal.ts';

/** A file that a call names, and the word that names it: `--pdf`, or what is read. */
export type NamedFile = { readonly as: string; readonly path: string | undefined };

/** The same for two names of one file: what the system counts it by where it is there, its whole path where it is not. */
async function identityOf(path: string): Promise<string> {
  try {
    const { dev, ino } = await stat(path, { bigint: true });
    return `${dev}:${ino}`;
  } catch {
    return resolve(path);
  }
}

/**
 * Looks, before any work is done, whether what a call writes would lie over what it reads, or over something else that it writes:
 * a scheme that its own report was written over is lost.
 * @param command  for the words of a refusal, such as `check`
 * @throws {Refusal} naming the option and what stands in its way
 */
export async function keepApart(
  command: string,
  read: readonly NamedFile[],
  written: readonly NamedFile[],
): Promise<void> {
  const taken = new Map<string, string>();
  for (const { as, path } of read) if (path !== undefined) taken.set(await identityOf(path), `is ${as} itself`);
  for (const { as, path } of written) {
    if (path === undefined) continue;
    const identity = await identityOf(path);
    const why = taken.get(identity);
    if (why !== undefined)
      throw new Refusal(`shadewright ${command}: ${as} ${path} ${why}, and would be written over; name another file.`);
    taken.set(identity, `is the file of ${as} too`);
  }
}
