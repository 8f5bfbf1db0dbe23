import type { Scheme } from './schema.ts';

/** Keys in the order in which a person would tell them; what is not here follows in alphabetical order. */
const ORDER = [
  'format',
  'version',
  'id',
  'kind',
  'title',
  'author',
  'address',
  'revision',
  'year',
  'name',
  'use',
  'standing',
  'room',
  'block',
  'latitude',
  'longitude',
  'zone',
  'elevation',
  'north',
  'groundReflectance',
  'linkeTurbidity',
  'lowSun',
  'hottest',
  'boundary',
  'at',
  'width',
  'depth',
  'turn',
  'box',
  'outline',
  'level',
  'base',
  'floor',
  'wall',
  'roof',
  'from',
  'sill',
  'height',
  'reveal',
  'glass',
  'devices',
  'normal',
  'g',
  'u',
  'light',
  'panes',
  'coating',
  'frame',
  'side',
  'place',
  'count',
  'spacing',
  'gap',
  'above',
  'below',
  'left',
  'right',
  'tilt',
  'transmittance',
  'reflectance',
  'closedAbove',
  'closedFrom',
  'closedTo',
  'trunk',
  'spread',
  'mass',
  'source',
  'site',
  'blocks',
  'rooms',
  'windows',
  'trees',
  'weather',
  'limits',
  'receptors',
  'sheets',
];
/** Lists of the scheme itself come after its devices' and windows' own fields of the same name. */
const SCHEME_ORDER = [
  'format',
  'version',
  'title',
  'author',
  'address',
  'revision',
  'year',
  'site',
  'blocks',
  'rooms',
  'windows',
  'glass',
  'devices',
  'trees',
  'weather',
  'limits',
  'receptors',
  'sheets',
  'variants',
];
const WIDE = 150;

function rank(order: readonly string[], key: string): number {
  const at = order.indexOf(key);
  return at < 0 ? order.length : at;
}

function sortedKeys(value: object, order: readonly string[]): string[] {
  return Object.keys(value)
    .filter((key) => (value as Record<string, unknown>)[key] !== undefined)
    .sort((a, b) => rank(order, a) - rank(order, b) || (a < b ? -1 : a > b ? 1 : 0));
}

function flat(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(flat).join(', ')}]`;
  if (value !== null && typeof value === 'object') {
    const inner = sortedKeys(value, ORDER).map(
      (key) => `${JSON.stringify(key)}: ${flat((value as Record<string, unknown>)[key])}`,
    );
    return inner.length === 0 ? '{}' : `{ ${inner.join(', ')} }`;
  }
  if (typeof value === 'number') return Object.is(value, -0) ? '0' : JSON.stringify(value);
  return JSON.stringify(value) ?? 'null';
}

function tall(value: unknown, indent: string, order: readonly string[]): string {
  const oneLine = flat(value);
  if (indent.length + oneLine.length <= WIDE || value === null || typeof value !== 'object') return oneLine;
  const deeper = `${indent}  `;
  if (Array.isArray(value)) return `[\n${value.map((v) => deeper + tall(v, deeper, ORDER)).join(',\n')}\n${indent}]`;
  const lines = sortedKeys(value, order).map(
    (key) => `${deeper}${JSON.stringify(key)}: ${tall((value as Record<string, unknown>)[key], deeper, ORDER)}`,
  );
  return `{\n${lines.join(',\n')}\n${indent}}`;
}

/**
 * The scheme as the text of its file: fixed key order, shortest exact numbers, short things on one line. Equal schemes give
 * equal bytes whatever order their keys came in; fields that this version does not know are written back.
 */
export function writeScheme(scheme: Scheme): string {
  const lines = sortedKeys(scheme, SCHEME_ORDER).map((key) => {
    const value = scheme[key];
    const list = Array.isArray(value) && value.some((v) => v !== null && typeof v === 'object');
    const text = list
      ? `[\n${(value as unknown[]).map((v) => `    ${tall(v, '    ', ORDER)}`).join(',\n')}\n  ]`
      : tall(value, '  ', ORDER);
    return `  ${JSON.stringify(key)}: ${text}`;
  });
  return `{\n${lines.join(',\n')}\n}\n`;
}
