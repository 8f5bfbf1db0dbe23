import { textPieces } from '../../app/contract/file-text.ts';
import { bytesHash } from '../../core/scheme/hash.ts';
import { loadScheme } from '../../core/scheme/load.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { writeScheme } from '../../core/scheme/write.ts';
import { guessTable } from '../../core/sky/weather/guess-table.ts';
import { planMap } from '../../core/study/exposure-map.ts';
import { neighbourLight } from '../../core/study/exposure-neighbours.ts';
import type { Pulse } from '../../core/study/job.ts';
import { momentStudy } from '../../core/study/moment.ts';
import { sunYear } from '../../core/study/sun-year.ts';
import { weatherFacts } from '../../core/study/weather-facts.ts';
import { askingWindow } from '../../core/study/window-light.ts';
import { windowMask } from '../../core/study/window-mask.ts';
import { sunEvents } from '../../core/sun/events.ts';
import { sunPath } from '../../core/sun/sun-path.ts';
import { whenSunAt } from '../../core/sun/when-sun-at.ts';
import { isZone } from '../../core/sun/civil.ts';
import { zoneDisagrees } from '../../core/sun/zone-disagrees.ts';
import { zoneOfPlace } from '../../core/sun/zone-of-place.ts';
import { Held, type Performer, type Performers } from './performer.ts';
import { roomTasks } from './room-tasks.ts';
import { sheetTasks } from './sheet-tasks.ts';
import type { DayEnds, Task, Work } from './tasks.ts';

/** Step of the year strip's clock [min]. */
const YEAR_STEP_min = 10;

function dayEnds(scheme: Scheme, date: string): DayEnds {
  const { site } = scheme;
  const observer = { latitude_deg: site.latitude, longitude_deg: site.longitude, elevation_m: site.elevation };
  const { sunrise_ms, sunset_ms, transit_ms, state } = sunEvents(date, site.zone, observer);
  return { date, sunrise_ms, sunset_ms, transit_ms, state };
}

const performers = (): Performers => ({
  ...roomTasks(),
  ...sheetTasks(),
  read: async ({ text }) => loadScheme(text),
  write: async ({ scheme }) => writeScheme(scheme),
  moment: async ({ instant_ms, date, wantModel }, held) => {
    const { scheme, model } = held();
    return {
      model: wantModel ? model : null,
      moment: momentStudy(scheme, model, instant_ms),
      day: dayEnds(scheme, date),
    };
  },
  year: ({ subject, stage, year }, held, pulse) => {
    const { scheme, model } = held();
    return sunYear(scheme, model, subject, stage, year, YEAR_STEP_min, pulse);
  },
  light: ({ window, trees }, held, pulse) => {
    const { scheme, model } = held();
    const asked = window === null ? model : askingWindow(model, window);
    if (asked === null) throw new Error(`the scheme has no window ${window}`);
    return neighbourLight(scheme, asked, { trees }, pulse);
  },
  mapPlan: async (ask, held) => planMap(held().scheme, held().model, ask),
  sunPath: async ({ observer, zone, year, window }, held) => ({
    path: sunPath(observer, zone, year),
    mask: window === null ? null : windowMask(held().model, window),
  }),
  whenSun: async ({ observer, azimuth_rad, altitude_rad, near_ms }) =>
    whenSunAt(azimuth_rad, altitude_rad, observer, near_ms),
  zoneOf: async ({ latitude, longitude, zone, instant_ms }) => ({
    suggested: zoneOfPlace(latitude, longitude),
    isOdd: isZone(zone) && zoneDisagrees(zone, longitude, instant_ms),
  }),
  weather: async ({ bytes, mapping, observer, zone }) => {
    const facts = weatherFacts(textPieces(bytes), mapping, observer, zone);
    return { hash: bytesHash(bytes), facts, guess: facts.ok ? null : guessTable(textPieces(bytes)) };
  },
});

/** A worker's memory of the scheme, and its one way in. */
export function taskPerformer(): (work: Work, pulse: Pulse) => Promise<unknown> {
  const all = performers();
  let held: Held | null = null;
  const given = (): Held => {
    if (held === null) throw new Error('this task needs a scheme, and none was sent');
    return held;
  };
  return (work, pulse) => {
    if (work.scheme !== null) held = new Held(work.scheme);
    const perform = all[work.task] as Performer<Task>;
    return perform(work.ask, given, pulse) as Promise<unknown>;
  };
}
