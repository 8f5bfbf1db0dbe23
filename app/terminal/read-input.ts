import { MAX_BYTES } from '../contract/host.ts';
import type { LimitSet } from '../../core/limits/limit-set.ts';
import { type Checked, type Fault, faultLine } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { readBounded } from '../files/read-bounded.ts';
import { Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';

const CURES = {
  missing: 'check the name and the folder you are in',
  denied: 'change its permissions or choose another file',
  'not-a-file': 'name an ordinary file',
  'too-large': 'a scheme of simple boxes needs far less; take out what is not needed',
  unreadable: 'try again or copy it elsewhere',
} as const;

/** The text of a file that the user named. @throws {Refusal} when it is missing, too large, not a file or not text */
export async function readText(path: string): Promise<string> {
  const read = await readBounded(path, MAX_BYTES);
  if (!read.ok) throw new Refusal(`${path}: ${read.fault.message}; ${CURES[read.fault.code]}.`);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(read.bytes);
  } catch {
    throw new Refusal(`${path}: the file is not text in UTF-8; save it again as UTF-8.`);
  }
}

/** A fault as a line of the command: file, place, what, cure. */
export const fileFault = (path: string, fault: Fault): string => `${path}: ${faultLine(fault)}.`;

/** Unwraps what was read, or refuses with every fault. Warnings are noted on the way. */
export function accepted<T>(path: string, read: Checked<T>, screen: Screen): T {
  if (!read.ok) throw new Refusal(...read.faults.map((fault) => fileFault(path, fault)));
  for (const note of read.notes) screen.note(`note: ${fileFault(path, note)}\n`);
  return read.value;
}

/** A scheme file, whole and checked, with its warnings. @throws {Refusal} with every fault and its place */
export async function readScheme(path: string, screen: Screen): Promise<{ scheme: Scheme; notes: readonly Fault[] }> {
  const text = await readText(path);
  const { loadScheme } = await import('../../core/scheme/load.ts');
  const read = loadScheme(text);
  return { scheme: accepted(path, read, screen), notes: read.ok ? read.notes : [] };
}

/** A limit-set file. @throws {Refusal} with every fault and its place */
export async function readLimits(path: string, screen: Screen): Promise<LimitSet> {
  const text = await readText(path);
  const { parseLimitSet } = await import('../../core/limits/load-limits.ts');
  return accepted(path, parseLimitSet(text), screen);
}
