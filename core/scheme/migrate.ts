import type { Fault } from './fault.ts';

/** The version that this program reads and writes. */
export const CURRENT_VERSION = 1;

/** One step from version `from` to `from + 1`: a pure function, kept for ever, with a frozen file in its test. */
export type Step = {
  readonly from: number;
  readonly migrate: (old: Record<string, unknown>) => Record<string, unknown>;
};

/** Version 1 is the first; the first step will stand here when there is a version 2. */
export const STEPS: readonly Step[] = [];

/**
 * Bring a parsed file to a version, one step at a time.
 * @returns the file at that version, or why it cannot be brought there
 */
export function migrate(
  file: Record<string, unknown>,
  steps: readonly Step[] = STEPS,
  current: number = CURRENT_VERSION,
): { ok: true; value: Record<string, unknown> } | { ok: false; fault: Fault } {
  const refuse = (message: string, cure: string) => ({
    ok: false as const,
    fault: { level: 'error' as const, code: 'version', place: 'version', message, cure },
  });
  const version = file['version'];
  if (typeof version !== 'number' || !Number.isInteger(version) || version < 1) {
    return refuse(
      `must be a whole number from 1 to ${current}, got ${JSON.stringify(version) ?? 'nothing'}`,
      `write "version": ${current}`,
    );
  }
  if (version > current) {
    return refuse(
      `the file is of version ${version}; this program reads versions up to ${current}`,
      'open it with a newer Shadewright',
    );
  }
  let now = file;
  for (let v = version; v < current; v++) {
    const step = steps.find((s) => s.from === v);
    if (!step) throw new Error(`no migration from version ${v}`);
    now = { ...step.migrate(now), version: v + 1 };
  }
  return { ok: true, value: now };
}
