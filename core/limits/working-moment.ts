import { openLightAt, viewOf } from '../gain/open-light.ts';
import { PARTS, type Part, type WindowDay } from '../gain/series.ts';
import { glassCurve } from '../gain/glass-light.ts';
import * as maths from '../maths/maths.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import { monthly, monthOf } from '../sky/monthly.ts';
import { SKY_MODELS } from '../sky/transpose.ts';
import { civilOf } from '../sun/civil.ts';
import { DEG } from '../units/angle.ts';
import type { WorkingStep } from './finding.ts';
import { line, placeOfId, type Worked, type WorkedWindow } from './worked.ts';

const PART_NAMES: { readonly [P in Part]: string } = {
  beam: 'beam',
  circumsolar: 'circumsolar light',
  sky: 'light of the dome',
  horizon: 'light of the horizon',
  ground: 'light from the ground',
};

/** Where the sun stands and how strong it is, at one step of a day. */
export function sunLines(result: Worked, grid: DayGrid, step: number): readonly WorkingStep[] {
  const at = civilOf(grid.instant_ms[step]!, result.zone);
  return [
    line('moment', at.text, '', { note: `middle of a step of ${grid.step_min} minutes; ${grid.name}` }),
    line('sun’s azimuth from true north', grid.azimuth_rad[step]! / DEG, '°', { place: 'site' }),
    line('sun’s true altitude', grid.altitude_rad[step]! / DEG, '°', { note: 'without refraction' }),
    line('direct sun, facing it', grid.beamNormal_Wm2[step]!, 'W/m²', { place: 'site.linkeTurbidity' }),
    line('sky light on the level', grid.diffuse_Wm2[step]!, 'W/m²'),
    line('sun and sky on the level', grid.global_Wm2[step]!, 'W/m²'),
    line('sky model', SKY_MODELS[result.skyModel].name, '', { note: SKY_MODELS[result.skyModel].source }),
  ];
}

type Source = { readonly result: Worked; readonly scheme: Scheme; readonly grid: DayGrid };

/** The opening and its glass: what a window's gain is multiplied with. */
function glassLines(source: Source, w: WorkedWindow, day: WindowDay, step: number): readonly WorkingStep[] {
  const { scheme } = source;
  const place = placeOfId(scheme.windows, w.window, 'windows');
  const entry = scheme.windows.find((x) => x.id === w.window);
  const glass = scheme.glass.find((g) => g.id === entry?.glass);
  if (!entry || !glass) return [];
  const glassPlace = placeOfId(scheme.glass, glass.id, 'glass');
  const curve = glassCurve(glass);
  const cos = day.cosIncidence[step]!;
  const lines = [
    line(`${w.window}: opening`, w.opening_m2, 'm²', { formula: 'width × height', place: `${place}.width` }),
    line(`${w.window}: frame`, glass.frame, '', { place: `${glassPlace}.frame` }),
    line(`${w.window}: glass`, w.glass_m2, 'm²', { formula: 'A = opening × (1 − frame)' }),
    line(`${w.window}: faces`, w.tilt_deg > 0 ? w.bearing_deg : 'up', w.tilt_deg > 0 ? '° from true north' : ''),
    line(`${w.window}: angle of incidence`, maths.acos(Math.min(1, cos)) / DEG, '°', {
      note: cos > 0 ? 'from the normal of the glass' : 'the sun is behind the glass or down',
    }),
    line(`${w.window}: sunlit share of the glass`, day.sunlit[step]!, '', {
      note: 'exact, by clipping the shadows of reveal, devices, blocks and trees',
      place,
    }),
    line(`${w.window}: g at normal incidence`, glass.g, '', { place: `${glassPlace}.g` }),
    line(`${w.window}: g at this angle`, glass.g * curve.at(cos), '', {
      formula: 'g(θ) = g·(1 − a·z^α − b·z² − c·z^γ), z = θ/90°',
      note: 'Karlsson and Roos 2000, from panes and coating category',
    }),
    line(`${w.window}: g for light from all round`, glass.g * curve.hemispherical, '', { note: 'hemispherical mean' }),
    line(`${w.window}: seen of the dome`, day.seen.sky, '', { note: 'cosine-weighted; open vertical glass sees 0.5' }),
    line(`${w.window}: seen of the horizon`, day.seen.horizon, ''),
    line(`${w.window}: seen of the ground`, day.seen.ground, '', { note: 'open vertical glass sees 0.5' }),
  ];
  if (entry.devices.some((id) => scheme.devices.find((d) => d.id === id)?.kind === 'blind'))
    lines.push(
      line(`${w.window}: left by its blinds`, day.blind[step]!, '', {
        note: day.blind[step]! < 1 ? 'closed; EN ISO 52022-1, simplified' : 'open at this moment',
        place: `${place}.devices`,
      }),
    );
  return lines;
}

/** Each part: on the open plane, what reaches the glass, what comes in. */
function partLines(source: Source, w: WorkedWindow, day: WindowDay, step: number): readonly WorkingStep[] {
  const { result, scheme, grid } = source;
  const reflectance = monthly(scheme.site.groundReflectance, monthOf(grid.date));
  const open = openLightAt(grid, step, w, result.skyModel, reflectance);
  const view = viewOf(day.seen, w.tilt_deg);
  const lines: WorkingStep[] = [];
  for (const part of PARTS) {
    const direct = part === 'beam' || part === 'circumsolar';
    const share = direct ? day.sunlit[step]! : view[part];
    const watts = day.parts[part][step]!;
    if (open[part] === 0 && watts === 0) continue;
    lines.push(
      line(
        `${w.window}: ${PART_NAMES[part]} on the open plane`,
        open[part],
        'W/m²',
        part === 'ground' ? { place: 'site.groundReflectance' } : {},
      ),
      line(`${w.window}: ${PART_NAMES[part]} that comes in`, watts, 'W', {
        formula: direct ? 'A × g(θ) × blind × sunlit × E' : 'A × g(hemispherical) × blind × seen/open × E',
        note: `${direct ? 'sunlit' : 'seen/open'} ${Number(share.toPrecision(4))}`,
      }),
    );
  }
  lines.push(line(`${w.window}: in all`, day.total_W[step]!, 'W', { formula: 'sum of its parts' }));
  return lines;
}

/** One window at one step, from opening to watts. */
export const windowLines = (source: Source, w: WorkedWindow, day: WindowDay, step: number): readonly WorkingStep[] => [
  ...glassLines(source, w, day, step),
  ...partLines(source, w, day, step),
];
