import { expect, test } from 'vitest';
import { Scheme } from '../../core/scheme/schema.ts';
import { faultsOf, formOf, type PlaceForm, placed, readForm } from '../../renderer/place/place-form.ts';

const scheme = Scheme.parse({
  format: 'shadewright',
  version: 1,
  title: 'kept',
  site: { latitude: 51.45, longitude: -2.59, zone: 'Europe/London', elevation: 18, north: 12, note: 'kept too' },
});

test('the fields say the site, and reading them gives it back', () => {
  const form = formOf(scheme.site);
  expect(form).toMatchObject({ latitude: '51.45', longitude: '−2.59', elevation: '18', zone: 'Europe/London' });
  expect(readForm(form)).toEqual({ latitude: 51.45, longitude: -2.59, elevation: 18, zone: 'Europe/London' });
});

test('each field that means nothing has its own fault', () => {
  const form: PlaceForm = { latitude: '95', longitude: '2 N', elevation: 'high', zone: '+01:00', isZoneOwn: true };
  expect(Object.values(faultsOf(form)).every((fault) => fault !== null)).toBe(true);
  const good = faultsOf(formOf(scheme.site));
  expect(Object.values(good)).toEqual([null, null, null, null]);
});

test('another place is one step that leaves the rest of the scheme alone', () => {
  const next = placed(scheme, { latitude: -33.9, longitude: 151.2, elevation: 20, zone: 'Australia/Sydney' });
  if (!next.ok) throw new Error(JSON.stringify(next.faults));
  expect(next.value.site).toMatchObject({ latitude: -33.9, zone: 'Australia/Sydney', north: 12, note: 'kept too' });
  expect(next.value.title).toBe('kept');
  expect(scheme.site.latitude).toBe(51.45);
});

test('a zone that no clock goes by is refused and nothing is changed', () => {
  const next = placed(scheme, { latitude: 0, longitude: 0, elevation: 0, zone: 'Nowhere/Here' });
  expect(next.ok).toBe(false);
});
