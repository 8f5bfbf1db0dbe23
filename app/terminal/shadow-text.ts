import { CAUTIONS } from '../../core/limits/cautions.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { writeCsv } from '../../core/sheet/csv.ts';
import { shadowTable, utc } from '../../core/sheet/data-tables.ts';
import type { ShadowMoment } from '../../core/sheet/shadow-moment.ts';
import { table } from './table.ts';

const area = (m2: number | undefined): string => (m2 === undefined ? '–' : m2.toFixed(1));
const share = (value: number): string => `${(100 * value).toFixed(0)} %`;

function asJson(moments: readonly ShadowMoment[]): string {
  const rows = moments.map((m) => ({
    instant: utc(m.instant_ms),
    local: m.text,
    azimuth: m.azimuth_deg,
    altitude: m.altitude_deg,
    before: m.change?.before.area_m2 ?? null,
    after: m.change?.after.area_m2 ?? null,
    added: m.change?.added.area_m2 ?? null,
    gained: m.change?.gained.area_m2 ?? null,
    areas: m.areas.map((a) => ({ id: a.id, before: a.before.share, after: a.after.share })),
    notes: m.notes,
  }));
  return `${JSON.stringify(rows, null, 2)}\n`;
}

function asText(scheme: Scheme, moments: readonly ShadowMoment[]): string {
  const areas = moments.find((m) => m.areas.length > 0)?.areas ?? [];
  return [
    `${scheme.title || 'Untitled scheme'}: shadow on level ground, in m². True altitude, no refraction; cloud is left out.`,
    '',
    table(
      [
        { head: 'civil time', align: 'left' },
        { head: 'azimuth', align: 'right' },
        { head: 'altitude', align: 'right' },
        { head: 'before', align: 'right' },
        { head: 'after', align: 'right' },
        { head: 'added', align: 'right' },
        { head: 'gained', align: 'right' },
        ...areas.map((a) => ({ head: `sun on ${a.name || a.id}`, align: 'right' as const })),
      ],
      moments.map((m) => [
        m.text,
        `${m.azimuth_deg.toFixed(1)}°`,
        `${m.altitude_deg.toFixed(1)}°`,
        ...(m.change
          ? [m.change.before, m.change.after, m.change.added, m.change.gained].map((s) => area(s.area_m2))
          : ['sun below', 'horizon', '', '']),
        ...(m.change ? m.areas.map((a) => `${share(a.before.share)} → ${share(a.after.share)}`) : []),
      ]),
    ),
    ...moments.flatMap((m) => m.notes.map((note) => `note: ${m.text}: ${note}`)),
    ...CAUTIONS,
    '',
  ].join('\n');
}

/** A shadow study as a table: for people, as CSV, or as JSON. */
export function shadowText(scheme: Scheme, moments: readonly ShadowMoment[], form: 'text' | 'csv' | 'json'): string {
  if (form === 'csv') return writeCsv(shadowTable(moments));
  return form === 'json' ? asJson(moments) : asText(scheme, moments);
}
