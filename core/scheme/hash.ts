import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';
import type { Scheme } from './schema.ts';
import { withoutVariants } from './variants.ts';
import { writeScheme } from './write.ts';

/**
 * Content hash of a text: SHA-256 in hexadecimal (64 digits). Sheets and reports print its first 12 digits, which is enough
 * to tell two revisions of a scheme apart.
 * @see FIPS 180-4, Secure Hash Standard
 */
export const contentHash = (text: string): string => bytesToHex(sha256(utf8ToBytes(text)));

/** Content hash of a scheme, whatever variants are kept beside it: they change no result. */
export const schemeHash = (scheme: Scheme): string => contentHash(writeScheme(withoutVariants(scheme)));

/** Content hash of a file's bytes, as `contentHash`: a weather file is known again by it, whatever its name. */
export const bytesHash = (bytes: Uint8Array): string => bytesToHex(sha256(bytes));

/** The same of bytes that come in pieces. */
export function growingHash(): { readonly add: (piece: Uint8Array) => void; readonly text: () => string } {
  const hash = sha256.create();
  return { add: (piece) => void hash.update(piece), text: () => bytesToHex(hash.digest()) };
}
