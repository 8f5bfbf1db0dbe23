/**
 * Whether a name is an IANA time zone that this machine knows. Bare offsets such as +01:00 are refused on purpose: they do
 * not know daylight saving.
 */
export function zoneExists(zone: string): boolean {
  const known = asked.get(zone);
  if (known !== undefined) return known;
  const exists = isKnown(zone);
  if (asked.size < MOST_ASKED) asked.set(zone, exists);
  return exists;
}

/** Making a formatter takes milliseconds, and every edit of a scheme asks for the same zone again; the answer never changes. */
const asked = new Map<string, boolean>();
const MOST_ASKED = 1000;

function isKnown(zone: string): boolean {
  if (!/^[A-Za-z]/.test(zone)) return false;
  try {
    new Intl.DateTimeFormat('en', { timeZone: zone });
    return true;
  } catch {
    return false;
  }
}
