import { CAUTIONS } from '../../core/limits/cautions.ts';
import type { Working, WorkingStep } from '../../core/limits/finding.ts';

/** Six figures: enough to work a number out again by hand. */
const figure = (value: number | string): string =>
  typeof value === 'string' ? value : Number.isInteger(value) ? String(value) : String(Number(value.toPrecision(6)));

function stepText(step: WorkingStep): string {
  const formula = step.formula === undefined ? '' : ` = ${step.formula}`;
  const from = [step.note, step.place].filter((text) => text !== undefined && text !== '').join('; ');
  return (
    `    ${step.label}${formula}: ${figure(step.value)} ${step.unit}`.trimEnd() + (from === '' ? '' : `  (${from})`)
  );
}

/** How numbers were reached, step by step, with method and source. */
export function workingText(workings: readonly Working[]): string {
  if (workings.length === 0)
    return 'This room has no finding to be worked out: it has no window, or no limit applies to it.\n';
  const worked = workings.map(({ title, method, source, steps }) =>
    [title, `  method: ${method}`, `  source: ${source}`, ...steps.map(stepText), ''].join('\n'),
  );
  return [...worked, ...CAUTIONS, ''].join('\n');
}
