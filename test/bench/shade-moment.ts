import { Clipper, FillRule, type Paths64 } from 'clipper2-ts';
import type { Solid, WindowForm } from '../../core/form/model.ts';
import { pointOn } from '../../core/form/panel.ts';
import { solidsAt } from '../../core/form/stands.ts';
import { convexHull } from '../../core/plane/convex-hull.ts';
import { dot, type Point, type Ring, type Vec3 } from '../../core/plane/vec.ts';
import { faceShadows } from '../../core/shade/face-shadow.ts';
import { shadowChange } from '../../core/shade/ground-shadow.ts';
import { windowSky } from '../../core/shade/sky-share.ts';
import { sunlitFraction, type WindowShade, windowShade } from '../../core/shade/sunlit-fraction.ts';
import { house, sunAt } from '../core/shade/small-scheme.ts';
import { blockField, box } from '../helpers/block-field.ts';
import { isHidden, meshOf } from '../helpers/ray-casts.ts';
import { seeded } from '../helpers/seeded.ts';
import type { Row } from './row.ts';

const RUNS = 7;
const sorted = (values: number[]): number[] => values.sort((a, b) => a - b);
const seconds = (work: () => void): number => {
  const start = performance.now();
  work();
  return (performance.now() - start) / 1000;
};

/** Shade at single moments: the sunlit fraction of windows, sky seen by them, and shadows of 200 blocks on ground and faces. */
export async function benchMoment(): Promise<Row[]> {
  return [fractionRow(), louvreRow(), skyRow(), groundRow(), faceRow()];
}

/** A window with an overhang, two fins and a bank of five blades (8 sheets), among twelve blocks: 20 hiding surfaces. */
function fractionRow(): Row {
  const next = seeded(11);
  const around = Array.from({ length: 12 }, (_, i) =>
    box(`N${i}`, -20 + 40 * next(), -17 - 25 * next(), 4 + 6 * next(), 4 + 6 * next(), 0, 4 + 12 * next(), next()),
  );
  const { window } = house({
    devices: [
      { kind: 'overhang', depth: 0.6, above: 0.1, left: 0.2, right: 0.2 },
      { kind: 'fin', depth: 0.4, gap: 0.05 },
      { kind: 'louvres', count: 5, spacing: 0.3, depth: 0.1 },
    ],
    window: { width: 2.4, reveal: 0.1 },
  });
  const suns = Array.from({ length: 500 }, () => sunAt(100 + 160 * next(), 3 + 60 * next()));
  const shade = windowShade(window, around, []);
  const mesh = meshOf(around, window.shaders);
  const exact = suns.map((sun) => sunlitFraction(shade, sun));
  // As many rays as bring the root mean square error under half a per cent of the glass.
  const error = (rays: number): number =>
    Math.sqrt(
      suns.reduce((sum, sun, i) => sum + (castFraction(window, mesh, sun, rays) - (exact[i] as number)) ** 2, 0) /
        suns.length,
    );
  let rays = 50;
  while (error(rays) > 0.005) rays = Math.ceil(rays * 1.25);
  const ours: number[] = [];
  const theirs: number[] = [];
  let check = 0;
  for (let run = 0; run < RUNS; run++) {
    ours.push(seconds(() => (check += fractions(shade, suns, 40))) / 40);
    theirs.push(
      seconds(() => {
        for (const sun of suns) check += castFraction(window, mesh, sun, rays);
      }),
    );
  }
  const [a, b] = [sorted(ours)[RUNS >> 1] as number, sorted(theirs)[RUNS >> 1] as number];
  return {
    what: 'sunlit fraction of a window, 20 hiding surfaces (bar 200 000)',
    ours_perSecond: suns.length / a,
    other: 'three-mesh-bvh 0.9.17',
    other_perSecond: suns.length / b,
    ratio: b / a,
    note: `ours exact; beside it ${rays} rays a fraction, error ${(100 * error(rays)).toFixed(2)} % of the glass (rms); mean ${(exact.reduce((s, f) => s + f, 0) / suns.length).toFixed(3)}; sum ${check.toFixed(1)}`,
  };
}

function fractions(shade: WindowShade, suns: readonly Vec3[], rounds: number): number {
  let sum = 0;
  for (let k = 0; k < rounds; k++) for (const sun of suns) sum += sunlitFraction(shade, sun);
  return sum;
}

/** The same by rays from points of a lattice on the glass, as fair as sampling gets. */
function castFraction(window: WindowForm, mesh: ReturnType<typeof meshOf>, sun: Vec3, rays: number): number {
  const out = dot(sun, window.normal);
  if (!(out > 0 && sun[2] > 0)) return 0;
  const t = window.reveal_m / out;
  const [dx, dy] = [t * dot(sun, window.right), t * dot(sun, window.up)];
  let lit = 0;
  for (let i = 0; i < rays; i++) {
    const x = ((i + 0.5) / rays) * window.width_m + dx;
    const y = ((0.5 + i * 0.6180339887498949) % 1) * window.height_m + dy;
    if (x < 0 || x > window.width_m || y < 0 || y > window.height_m) continue;
    if (!isHidden(mesh, pointOn(window, x, y, 0), window.normal, sun, 0)) lit++;
  }
  return lit / rays;
}

/** The hardest case for clipping: a pane cut into strips. */
function louvreRow(): Row {
  const next = seeded(12);
  const { window } = house({ devices: [{ kind: 'louvres', count: 20, spacing: 0.075, depth: 0.06 }] });
  const suns = Array.from({ length: 500 }, () => sunAt(100 + 160 * next(), 3 + 60 * next()));
  const shade = windowShade(window, [], []);
  const times: number[] = [];
  let check = 0;
  for (let run = 0; run < RUNS; run++) times.push(seconds(() => (check += fractions(shade, suns, 10))) / 10);
  return {
    what: 'the same behind a bank of 20 blades',
    ours_perSecond: suns.length / (sorted(times)[RUNS >> 1] as number),
    other: '',
    other_perSecond: null,
    ratio: null,
    note: `sum ${check.toFixed(1)}`,
  };
}

/** Sky, horizon, ground and overcast light of windows on the walls of a town. */
function skyRow(): Row {
  const { solids } = blockField(3, 200);
  const { window } = house({ window: { reveal: 0.15 } });
  const next = seeded(13);
  const windows = Array.from({ length: 200 }, (): WindowForm => {
    const on = solids[Math.floor(next() * solids.length)] as Solid;
    const [a, b] = [on.outline[0], on.outline[1]] as [Point, Point];
    const run = Math.hypot(b[0] - a[0], b[1] - a[1]);
    const [dx, dy] = [(b[0] - a[0]) / run, (b[1] - a[1]) / run];
    return {
      ...window,
      origin: [a[0] + 2 * dx, a[1] + 2 * dy, 1],
      right: [dx, dy, 0],
      normal: [dy, -dx, 0],
      shaders: [],
    };
  });
  const times: number[] = [];
  let check = 0;
  for (let run = 0; run < RUNS; run++)
    times.push(
      seconds(() => {
        for (const w of windows) check += windowSky(windowShade(w, solids, [])).sky;
      }),
    );
  const middle = sorted(times)[RUNS >> 1] as number;
  return {
    what: 'sky, horizon and ground of a window among 200 blocks',
    ours_perSecond: windows.length / middle,
    other: '',
    other_perSecond: null,
    ratio: null,
    note: `200 windows in ${(1000 * middle).toFixed(0)} ms, preparation included (bar 500); mean sky ${(check / RUNS / 200).toFixed(3)}`,
  };
}

const STANDINGS = ['context', 'existing', 'context', 'proposed', 'context', 'removed'] as const;

/** 200 blocks at a new moment: before, after, added and gained, beside the same four by plain unions of the same hulls. */
function groundRow(): Row {
  const solids = blockField(5, 200).solids.map(
    (s, i): Solid => ({ ...s, standing: i % 9 === 0 ? (STANDINGS[(i / 9) % 6] ?? 'context') : 'context' }),
  );
  const suns = Array.from({ length: 60 }, (_, i) =>
    sunAt(100 + 160 * (i / 60), 4 + 50 * Math.sin((Math.PI * (i + 0.5)) / 60)),
  );
  const ours: number[] = [];
  const theirs: number[] = [];
  let [area, plain] = [0, 0];
  for (let run = 0; run < RUNS; run++)
    for (const sun of suns) {
      const a = seconds(() => (area += shadowChange(solids, sun, 0).after.area_m2));
      const b = seconds(() => (plain += plainChange(solids, sun)));
      if (run === 0) continue; // warm-up
      ours.push(a);
      theirs.push(b);
    }
  const middle = sorted(ours)[ours.length >> 1] as number;
  const other = sorted(theirs)[theirs.length >> 1] as number;
  const ms = (share: number): string => (1000 * (ours[Math.floor(share * (ours.length - 1))] as number)).toFixed(1);
  return {
    what: 'shadows of 200 blocks on the ground, before, after, added, gained',
    ours_perSecond: 1 / middle,
    other: 'clipper2-ts 2.0.1, plain',
    other_perSecond: 1 / other,
    ratio: other / middle,
    note: `least ${ms(0)} ms, median ${ms(0.5)}, 95 of 100 under ${ms(0.95)} (bar 16); areas agree to ${Math.abs(area / plain - 1).toExponential(0)}`,
  };
}

function plainChange(solids: readonly Solid[], sun: Vec3): number {
  const grid = (ring: Ring) => ring.map((p) => ({ x: Math.round(p[0] * 1e4), y: Math.round(p[1] * 1e4) }));
  const cast = (s: Solid) => {
    const k = s.top_m / sun[2];
    return grid(convexHull([...s.outline, ...s.outline.map((p): Point => [p[0] - k * sun[0], p[1] - k * sun[1]])]));
  };
  const [feetBefore, feetAfter] = [solidsAt(solids, 'before'), solidsAt(solids, 'after')].map((l) =>
    l.map((s) => grid(s.outline)),
  ) as [Paths64, Paths64];
  const before = Clipper.difference(solidsAt(solids, 'before').map(cast), feetBefore, FillRule.NonZero);
  const after = Clipper.difference(solidsAt(solids, 'after').map(cast), feetAfter, FillRule.NonZero);
  const added = Clipper.difference(after, [...before, ...feetBefore], FillRule.NonZero);
  const gained = Clipper.difference(before, [...after, ...feetAfter], FillRule.NonZero);
  return (Clipper.areaPaths(after) + 0 * (added.length + gained.length)) / 1e8;
}

/** Every roof and wall of 200 blocks at a new moment. */
function faceRow(): Row {
  const { solids } = blockField(5, 200);
  const suns = Array.from({ length: 60 }, (_, i) =>
    sunAt(100 + 160 * (i / 60), 4 + 50 * Math.sin((Math.PI * (i + 0.5)) / 60)),
  );
  const times: number[] = [];
  let polygons = 0;
  for (let run = 0; run < RUNS; run++)
    for (const sun of suns)
      times.push(seconds(() => (polygons += faceShadows(solids, sun).reduce((sum, f) => sum + f.polygons.length, 0))));
  sorted(times);
  const at = (share: number): number => times[Math.floor(share * (times.length - 1))] as number;
  return {
    what: 'shadows of 200 blocks on all their roofs and walls',
    ours_perSecond: 1 / at(0.5),
    other: '',
    other_perSecond: null,
    ratio: null,
    note: `median ${(1000 * at(0.5)).toFixed(1)} ms, 95 of 100 under ${(1000 * at(0.95)).toFixed(1)}; ${Math.round(polygons / RUNS / 60)} polygons a moment`,
  };
}
