import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { expect } from 'vitest';

/** One check of a reference file: what went in, what an independent implementation gave. */
export type Case = {
  id: string;
  kind: string;
  inputs: Record<string, unknown>;
  expected: Record<string, unknown>;
  intermediate?: Record<string, unknown>;
};

/** The cases of one kind in a file of test/reference; its source is stated in its head. */
export function cases(file: string, kind: string): Case[] {
  const text = readFileSync(resolve(import.meta.dirname, '../../reference', file), 'utf8');
  const found = (JSON.parse(text) as { cases: Case[] }).cases.filter((c) => c.kind === kind);
  if (found.length === 0) throw new Error(`no ${kind} in ${file}`);
  return found;
}

/** Numbers agree to a share of the expected value, or to an absolute difference near zero. */
export function near(got: number, expected: unknown, relative: number, absolute: number, what: string): void {
  const want = expected as number;
  const off = Math.abs(got - want);
  expect(off <= Math.max(absolute, relative * Math.abs(want)), `${what}: got ${got}, expected ${want}`).toBe(true);
}
