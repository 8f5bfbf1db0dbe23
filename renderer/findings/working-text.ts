import type { Working, WorkingStep } from '../../core/limits/finding.ts';
import { decimalsFor, fixed } from '../ui/format.ts';
import { words } from '../words/words.ts';

/** A step's value as it is read: numbers to about four figures, text as it stands. */
export function stepValue({ value, unit }: WorkingStep): string {
  const text = typeof value === 'number' ? fixed(value, Number.isInteger(value) ? 0 : decimalsFor(value) + 1) : value;
  return unit === '' ? text : `${text} ${unit}`;
}

/** A working as plain text, for a letter or a file note. */
export function workingText(heading: string, working: Working): string {
  const lines = working.steps.map((s) => {
    const extra = [s.formula, s.note, s.place].filter(Boolean).join(' · ');
    return `${s.label}: ${stepValue(s)}${extra === '' ? '' : `   [${extra}]`}`;
  });
  return [
    heading,
    working.title,
    '',
    `${words.findings.method}: ${working.method}`,
    `${words.findings.source}: ${working.source}`,
    '',
    ...lines,
    '',
  ].join('\n');
}
