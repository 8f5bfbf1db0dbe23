import type { Model, Stage } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import type { Scheme } from '../scheme/schema.ts';
import { type AreaShade, type AreaSun, areaShade, areaSunlit } from '../shade/area-sunlit.ts';
import { type FaceShadow, faceShadows } from '../shade/face-shadow.ts';
import { shadowChange } from '../shade/ground-shadow.ts';
import type { ShadowChange } from '../shade/shadow.ts';
import { sunVector } from '../shade/sun-vector.ts';
import { panelShade, sunlitFraction, type WindowShade, windowShade } from '../shade/sunlit-fraction.ts';
import { type CivilTime, civilOf } from '../sun/civil.ts';
import type { SunPosition } from '../sun/position.ts';
import { sunPosition } from '../sun/spa.ts';
import { DEG } from '../units/angle.ts';

/** The ground that shadows are drawn on [m]: zero of the drawing. */
export const GROUND_m = 0;

/** A scheme at one instant: plain data, fit to be posted from a worker. */
export type MomentResult = {
  readonly instant_ms: number;
  readonly civil: CivilTime;
  readonly sun: SunPosition;
  /** Whether the sun is above the horizon (true altitude above 0) and yet at or below the scheme's `lowSun`. */
  readonly isLowSun: boolean;
  /** On the ground at `GROUND_m`; null with the sun at or below the horizon. */
  readonly shadows: ShadowChange | null;
  /** The stage that `faces` shows. */
  readonly stage: Stage;
  readonly faces: readonly FaceShadow[];
  /** Sunlit fraction of the glass of each window of the scheme, as it will stand, 0..1. */
  readonly windows: readonly { readonly window: string; readonly sunlit: number }[];
  /** Neighbours' windows and amenity areas, before and after. Of a window the sunlit share of its glass, 0..1. */
  readonly neighbours: readonly { readonly receptor: string; readonly before: number; readonly after: number }[];
  readonly areas: readonly { readonly receptor: string; readonly before: AreaSun; readonly after: AreaSun }[];
};

/**
 * Where the sun stands at an instant and what it does to a scheme: shadows on the ground before and after, on every roof and
 * wall, and the share of each window, neighbour's window and amenity area in sun. The sun is a point at its true altitude;
 * sun below the scheme's `lowSun` is drawn like any other and marked. Crowns of trees let through what the month says; they
 * are not among the drawn shadows.
 * @param model       `buildModel(scheme)`; what it is asked for again is kept with it
 * @param instant_ms  UTC
 * @param stage       what stands while the faces are drawn
 */
export function momentStudy(scheme: Scheme, model: Model, instant_ms: number, stage: Stage = 'after'): MomentResult {
  const { site } = scheme;
  const sun = sunPosition(instant_ms, {
    latitude_deg: site.latitude,
    longitude_deg: site.longitude,
    elevation_m: site.elevation,
  });
  const civil = civilOf(instant_ms, site.zone);
  const month = Number(civil.date.slice(-5, -3));
  const ray = sunVector(sun.azimuth_deg * DEG, sun.altitude_deg * DEG, model.north_rad);
  const isUp = sun.altitude_deg > 0;
  const { windows, neighbours, areas } = preparedFor(model);
  return {
    instant_ms,
    civil,
    sun,
    isLowSun: isUp && sun.altitude_deg <= (site.lowSun ?? 0),
    shadows: isUp ? shadowChange(model.solids, ray, GROUND_m) : null,
    stage,
    faces: faceShadows(solidsAt(model.solids, stage), ray),
    windows: windows.map(({ id, shade }) => ({ window: id, sunlit: sunlitFraction(shade, ray, month) })),
    neighbours: neighbours.map(({ id, before, after }) => ({
      receptor: id,
      before: sunlitFraction(before, ray, month),
      after: sunlitFraction(after, ray, month),
    })),
    areas: areas.map(({ id, before, after }) => ({
      receptor: id,
      before: areaSunlit(before, ray, month),
      after: areaSunlit(after, ray, month),
    })),
  };
}

type Prepared = {
  readonly windows: readonly { readonly id: string; readonly shade: WindowShade }[];
  readonly neighbours: readonly { readonly id: string; readonly before: WindowShade; readonly after: WindowShade }[];
  readonly areas: readonly { readonly id: string; readonly before: AreaShade; readonly after: AreaShade }[];
};

/** What does not depend on the instant, by the model it belongs to: models are never edited, and go with their owner. */
const preparedModels = new WeakMap<Model, Prepared>();

function preparedFor(model: Model): Prepared {
  const known = preparedModels.get(model);
  if (known) return known;
  const before = solidsAt(model.solids, 'before');
  const after = solidsAt(model.solids, 'after');
  const neighbours: Prepared['neighbours'][number][] = [];
  const areas: Prepared['areas'][number][] = [];
  for (const r of model.receptors) {
    const { panel } = r;
    if (r.kind === 'window' && panel !== undefined) {
      const seen = (solids: typeof after) => panelShade(panel, 0, [], solids, model.trees);
      neighbours.push({ id: r.id, before: seen(before), after: seen(after) });
    } else if (r.kind === 'area') {
      const lawn = (solids: typeof after) => areaShade(r.outline, r.level, solids, model.trees);
      areas.push({ id: r.id, before: lawn(before), after: lawn(after) });
    }
  }
  const windows = model.windows.map((w) => ({ id: w.id, shade: windowShade(w, after, model.trees) }));
  const prepared = { windows, neighbours, areas };
  preparedModels.set(model, prepared);
  return prepared;
}
