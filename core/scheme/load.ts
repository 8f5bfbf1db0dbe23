import { checkGeometry } from './check-geometry.ts';
import { checkReferences } from './check-references.ts';
import { checkStock } from './check-stock.ts';
import type { Checked, Fault } from './fault.ts';
import { jsonFaultAt, lineAndColumn } from './json-fault.ts';
import { migrate } from './migrate.ts';
import { misspelt } from './misspelt.ts';
import { MOST_NESTED, nestsTooDeep } from './nesting.ts';
import { sayIssue } from './say-issue.ts';
import { Scheme } from './schema.ts';
import { fillShares } from './window-share.ts';
import { zoneExists } from './zone-exists.ts';

/** The longest file text that is read, in characters. */
export const MAX_TEXT = 64 * 1024 * 1024;
/** Faults shown of one file; the rest is counted. */
const MAX_FAULTS = 200;

const wholeFile = (code: string, message: string, cure: string): Checked<never> => ({
  ok: false,
  faults: [{ level: 'error', code, place: '', message, cure }],
});

/** Keys with which a file could reach into objects that are not its own. */
function hasForbiddenKey(value: unknown): boolean {
  const open: unknown[] = [value];
  while (open.length > 0) {
    const now = open.pop();
    if (now === null || typeof now !== 'object') continue;
    if (Object.hasOwn(now, '__proto__')) return true;
    for (const inner of Array.isArray(now) ? now : Object.values(now)) open.push(inner);
  }
  return false;
}

function atMost(faults: readonly Fault[]): readonly Fault[] {
  if (faults.length <= MAX_FAULTS) return faults;
  const more: Fault = {
    level: 'error',
    code: 'more-faults',
    place: '',
    message: `and ${faults.length - MAX_FAULTS} more faults`,
    cure: 'mend these first',
  };
  return [...faults.slice(0, MAX_FAULTS), more];
}

/**
 * Read the text of a scheme file: parse, migrate, validate, and look for geometry that contradicts itself. Nothing is
 * repaired and nothing half-loaded: either the whole scheme comes back, with warnings, or every fault with its place.
 * @param text  the file as it stands
 */
export function loadScheme(text: string): Checked<Scheme> {
  if (text.length > MAX_TEXT)
    return wholeFile(
      'too-large',
      `the file is larger than ${MAX_TEXT / 1024 / 1024} MB`,
      'a scheme of simple boxes needs far less; split it or leave out what is not built',
    );
  let parsed: unknown;
  try {
    parsed = JSON.parse(text.charCodeAt(0) === 0xfeff ? text.slice(1) : text);
  } catch {
    // What begins with neither a bracket nor a space is no scheme with a slip in it, but another kind of file.
    if (!/^\uFEFF?\s*[[{]/.test(text))
      return wholeFile(
        'not-json',
        text.trim() === ''
          ? 'the file is empty, which is not valid JSON'
          : 'the file is not valid JSON, nor like it: it is another kind of file',
        'choose a scheme file; its name mostly ends in .scheme.json',
      );
    const place = lineAndColumn(text, jsonFaultAt(text));
    return {
      ok: false,
      faults: [
        {
          level: 'error',
          code: 'not-json',
          place,
          message: 'the file is not valid JSON',
          cure: 'look for a missing comma, bracket or quote, or for a value such as NaN that JSON does not know',
        },
      ],
    };
  }
  if (parsed === null || typeof parsed !== 'object' || Array.isArray(parsed))
    return wholeFile(
      'not-a-scheme',
      'the file is JSON, but not a scheme',
      'a scheme is an object with "format": "shadewright"',
    );
  if (nestsTooDeep(parsed))
    return wholeFile(
      'too-deep',
      `the file nests deeper than ${MOST_NESTED} levels`,
      'take out what is not of the scheme',
    );
  const file = parsed as Record<string, unknown>;
  if (text.includes('__proto__') && hasForbiddenKey(file))
    return wholeFile('forbidden-key', 'a key named __proto__ is not allowed', 'take it out');
  return readScheme(file);
}

/** A scheme as it was parsed: migrated, validated, its variants too. */
function readScheme(file: Record<string, unknown>): Checked<Scheme> {
  if (file['format'] !== 'shadewright') {
    return {
      ok: false,
      faults: [
        {
          level: 'error',
          code: 'not-a-scheme',
          place: 'format',
          message: 'the file does not say that it is a scheme',
          cure: 'a scheme starts with "format": "shadewright"',
        },
      ],
    };
  }
  const moved = migrate(file);
  if (!moved.ok) return { ok: false, faults: [moved.fault] };
  const { file: filled, faults: shares } = fillShares(moved.value);
  const read = Scheme.safeParse(filled);
  if (!read.success || shares.length > 0) {
    // A share that makes no width is told once, not as a width that is missing too.
    const told = (read.error?.issues ?? []).flatMap((issue) => sayIssue(issue, filled));
    const places = new Set(shares.flatMap(({ place }) => [place, place.replace(/share$/, 'width')]));
    return { ok: false, faults: atMost([...shares, ...told.filter(({ place }) => !places.has(place))]) };
  }
  const checked = checkScheme(read.data);
  const notes = misspelt(moved.value as Record<string, unknown>);
  if (!checked.ok) return { ok: false, faults: atMost([...checked.faults, ...notes]) };
  const whole = readVariants(checked.value);
  return whole.ok ? { ...whole, notes: [...notes, ...checked.notes, ...whole.notes] } : whole;
}

/** The variants of a scheme, each read as a scheme of its own; its faults stand under its place. */
function readVariants(scheme: Scheme): Checked<Scheme> {
  if (scheme.variants === undefined) return { ok: true, value: scheme, notes: [] };
  const found: Fault[] = [];
  const variants = scheme.variants.map((variant, i) => {
    const place = `variants[${i}]`;
    const same = scheme.variants?.findIndex(({ name }) => name === variant.name);
    if (same !== i)
      found.push({
        level: 'error',
        code: 'same-name',
        place: `${place}.name`,
        message: `another variant is called ${JSON.stringify(variant.name)}`,
        cure: 'give each a name of its own',
      });
    if (variant.scheme['variants'] !== undefined) {
      const message = 'a variant has no variants of its own';
      found.push({ level: 'error', code: 'too-deep', place: `${place}.scheme.variants`, message, cure: 'take it out' });
      return variant;
    }
    const read = readScheme(variant.scheme);
    const inside = (fault: Fault): Fault => ({
      ...fault,
      place: fault.place === '' ? `${place}.scheme` : `${place}.scheme.${fault.place}`,
    });
    found.push(...(read.ok ? read.notes : read.faults).map(inside));
    return read.ok ? { ...variant, scheme: read.value } : variant;
  });
  return found.some((fault) => fault.level === 'error')
    ? { ok: false, faults: atMost(found) }
    : { ok: true, value: { ...scheme, variants }, notes: found };
}

/** What a scheme's own values cannot say: references, geometry and the zone. Also for a scheme that was made by editing. */
export function checkScheme(scheme: Scheme): Checked<Scheme> {
  const found: Fault[] = [];
  if (!zoneExists(scheme.site.zone)) {
    found.push({
      level: 'error',
      code: 'unknown-zone',
      place: 'site.zone',
      message: `no time zone is called ${JSON.stringify(scheme.site.zone)}`,
      cure: 'write an IANA name such as Europe/London',
    });
  }
  found.push(...checkReferences(scheme), ...checkStock(scheme));
  // Geometry needs its references: a window of no room has no wall to stand in.
  if (found.every((f) => f.level === 'warning')) found.push(...checkGeometry(scheme));
  const errors = found.filter((f) => f.level === 'error');
  return errors.length > 0
    ? { ok: false, faults: atMost([...errors, ...found.filter((f) => f.level === 'warning')]) }
    : { ok: true, value: scheme, notes: found };
}
