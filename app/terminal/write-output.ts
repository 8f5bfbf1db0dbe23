import { saveSet, SetFault, type SetFile } from '../files/save-set.ts';
import { writeReason } from '../files/write-reason.ts';
import { Refusal } from './refusal.ts';

/** Writes the files that the user named, all of them whole or none. @throws {Refusal} when the system will not have one there */
export async function writeOutputs(files: readonly SetFile[]): Promise<void> {
  try {
    await saveSet(files);
  } catch (error) {
    if (!(error instanceof SetFault)) throw error;
    const others = files.length > 1 ? ', and none of the others' : '';
    throw new Refusal(
      `${error.path}: the file was not written${others}, ${writeReason(error.cause)}; choose another place for it.`,
    );
  }
}

/** Writes one file, whole or not at all. */
export const writeOutput = (path: string, bytes: Uint8Array | string): Promise<void> => writeOutputs([[path, bytes]]);
