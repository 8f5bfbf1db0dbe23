import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import type { Observer } from '../../../core/sun/position.ts';

/** The cases of one reference file; what it holds, from where and how it was made stands in the file's own head. */
export function referenceCases<T>(file: string): readonly T[] {
  const path = resolve(import.meta.dirname, '../../reference', file);
  return (JSON.parse(readFileSync(path, 'utf8')) as { cases: readonly T[] }).cases;
}

export type PositionCase = {
  readonly id: string;
  readonly tags: readonly string[];
  readonly inputs: {
    readonly place: string;
    readonly latitude: number;
    readonly longitude: number;
    readonly altitude: number;
    readonly pressure: number;
    readonly temperature: number;
    readonly delta_t: number;
    readonly delta_t_source: string;
    readonly utc: string;
    readonly zone: string;
    readonly local: string;
    readonly utc_offset_min: number;
  };
  readonly expected: {
    readonly zenith: number;
    readonly apparent_elevation: number;
    readonly azimuth: number;
    readonly equation_of_time: number;
    readonly earth_sun_distance: number;
  };
  readonly intermediate: Readonly<Record<string, number>>;
};

/** Sixty positions by an independent implementation of the same algorithm. */
export const positionCases = (): readonly PositionCase[] => referenceCases<PositionCase>('sun-position.json');

export const observerOf = ({ inputs: i }: PositionCase): Observer => ({
  latitude_deg: i.latitude,
  longitude_deg: i.longitude,
  elevation_m: i.altitude,
  pressure_hPa: i.pressure / 100,
  temperature_C: i.temperature,
  deltaT_s: i.delta_t,
});

/** Smaller angle between two directions of the compass [°]. */
export const apart_deg = (a: number, b: number): number => Math.abs(((a - b + 540) % 360) - 180);
