import type { Fault } from '../scheme/fault.ts';
import { DEG } from '../units/angle.ts';
import { CLEAR_SKY_MODELS, type ClearAir } from './clear-sky.ts';
import type { DayGrid } from './day-grid.ts';

/** Less of a day's beam than this below a model's range is not worth a word. */
const WORTH_SAYING = 0.01;

/**
 * What must be said of a design day's validity: how much of its beam came from a sun lower than the clear-sky model is good for.
 * Empty where that is less than a hundredth.
 * @param model  the clear-sky model that the day was made with
 */
export function lowSunNote(day: DayGrid, model: ClearAir['model'] = 'ineichen-perez'): readonly Fault[] {
  const { lowestAltitude_deg, name } = CLEAR_SKY_MODELS[model];
  let low = 0;
  let all = 0;
  day.beamNormal_Wm2.forEach((beam, i) => {
    all += beam;
    if (day.altitude_rad[i]! < lowestAltitude_deg * DEG) low += beam;
  });
  if (!(low > WORTH_SAYING * all)) return [];
  const share = Math.round((100 * low) / all);
  return [
    {
      level: 'warning',
      code: 'low-sun',
      place: '',
      message: `${share} % of the beam of ${day.date} comes from a sun below ${lowestAltitude_deg}°, lower than ${name} is good for`,
      cure: 'take gains of that time as rough',
    },
  ];
}
