import { Refusal } from './refusal.ts';

/** A zone that the system of zones knows. @throws {Refusal} otherwise */
export async function checkedZone(zone: string): Promise<string> {
  const { isZone } = await import('../../core/sun/civil.ts');
  if (!isZone(zone))
    throw new Refusal(
      `--zone ${zone}: there is no such time zone; give an IANA name such as Europe/London or Australia/Sydney.`,
    );
  return zone;
}
