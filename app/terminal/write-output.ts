import { writeReason } from '../files/write-reason.ts';
import { saveAtomic } from '../files/save-atomic.ts';
import { Refusal } from './refusal.ts';

/** Writes a file that the user named, whole or not at all. @throws {Refusal} when the system will not have it there */
export async function writeOutput(path: string, bytes: Uint8Array | string): Promise<void> {
  try {
    await saveAtomic(path, bytes);
  } catch (error) {
    throw new Refusal(`${path}: the file was not written, ${writeReason(error)}; choose another place for it.`);
  }
}
