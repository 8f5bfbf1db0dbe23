import type { Fault } from '../scheme/fault.ts';
import type { Need } from './clear-sun.ts';

/** A fault when a number is missing, not finite or outside its span; an empty list when it is good. */
export function outOfRange(value: number | undefined, need: Omit<Need, 'key'>, place: string): Fault[] {
  if (value !== undefined && value >= need.min && value <= need.max) return [];
  const unit = need.unit === '' ? '' : ` ${need.unit}`;
  return [
    {
      level: 'error',
      code: value === undefined ? 'missing' : 'out-of-range',
      place,
      message: `${need.name} must be from ${need.min} to ${need.max}${unit}, got ${value === undefined ? 'nothing' : String(value)}`,
      cure: `enter a value in that range; usual: ${need.usual}`,
    },
  ];
}
