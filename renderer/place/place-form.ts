import { type Checked, faultLine } from '../../core/scheme/fault.ts';
import { applyEdit } from '../../core/scheme/edit.ts';
import type { Scheme, Site } from '../../core/scheme/schema.ts';
import { isZone } from '../../core/sun/civil.ts';
import { committed, edit } from '../state/document.ts';
import { words } from '../words/words.ts';
import { parseLatitude, parseLongitude } from './parse-degrees.ts';

/** The fields of the dialog as they are typed. */
export type PlaceForm = {
  readonly latitude: string;
  readonly longitude: string;
  readonly elevation: string;
  readonly zone: string;
  /** Whether the zone was chosen by hand and no longer follows the coordinates. */
  readonly isZoneOwn: boolean;
};

export type PlaceValues = Pick<Site, 'latitude' | 'longitude' | 'elevation' | 'zone'>;
export type PlaceFaults = { readonly [F in keyof PlaceValues]: string | null };

/** A number as a person would type it: without trailing noughts. */
export const plain = (value: number, decimals: number): string =>
  String(Math.round(value * 10 ** decimals) / 10 ** decimals).replace('-', '−');

export const formOf = ({ latitude, longitude, elevation, zone }: Site): PlaceForm => ({
  latitude: plain(latitude, 6),
  longitude: plain(longitude, 6),
  elevation: plain(elevation, 2),
  zone,
  isZoneOwn: false,
});

const ELEVATION = { least: -500, most: 9000 } as const;

function parseElevation(text: string): number | null {
  const value = /^\s*[+\-−]?\d+([.,]\d+)?\s*m?\s*$/.test(text)
    ? Number(text.replace('−', '-').replace(',', '.').replace(/m/, '').trim())
    : Number.NaN;
  return value >= ELEVATION.least && value <= ELEVATION.most ? value : null;
}

/** What the fields mean, field by field; null where one means nothing. */
export function readForm(form: PlaceForm): { readonly [F in keyof PlaceValues]: PlaceValues[F] | null } {
  return {
    latitude: parseLatitude(form.latitude),
    longitude: parseLongitude(form.longitude),
    elevation: parseElevation(form.elevation),
    zone: isZone(form.zone.trim()) ? form.zone.trim() : null,
  };
}

export function faultsOf(form: PlaceForm): PlaceFaults {
  const read = readForm(form);
  return {
    latitude: read.latitude === null ? words.place.badLatitude : null,
    longitude: read.longitude === null ? words.place.badLongitude : null,
    elevation: read.elevation === null ? words.place.badElevation : null,
    zone: read.zone === null ? words.place.badZone : null,
  };
}

/** The scheme at another place: one step, all of it or none. */
export const placed = (scheme: Scheme, { latitude, longitude, elevation, zone }: PlaceValues): Checked<Scheme> =>
  applyEdit(scheme, {
    kind: 'together',
    name: words.place.edit,
    edits: Object.entries({ latitude, longitude, elevation, zone }).map(([field, value]) => ({
      kind: 'set-head' as const,
      field: `site.${field}`,
      value,
    })),
  });

/** Sets the place of the open scheme. @returns why it was refused, or null */
export function applyPlace(form: PlaceForm): string | null {
  const scheme = committed.peek();
  const { latitude, longitude, elevation, zone } = readForm(form);
  if (scheme === null || latitude === null || longitude === null || elevation === null || zone === null) return '';
  const next = placed(scheme, { latitude, longitude, elevation, zone });
  if (!next.ok) return next.faults.map(faultLine).join(' · ');
  edit(words.place.edit, () => next.value);
  return null;
}
