/**
 * Whether a name is an IANA time zone that this machine knows. Bare offsets such as +01:00 are refused on purpose: they do
 * not know daylight saving.
 */
export function zoneExists(zone: string): boolean {
  if (!/^[A-Za-z]/.test(zone)) return false;
  try {
    new Intl.DateTimeFormat('en', { timeZone: zone });
    return true;
  } catch {
    return false;
  }
}
