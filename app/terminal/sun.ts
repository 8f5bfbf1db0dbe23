import { Option } from 'commander';
import { CAUTIONS } from '../../core/limits/cautions.ts';
import { checkInstant, checkObserver } from '../../core/sun/check-observer.ts';
import type { Observer } from '../../core/sun/position.ts';
import { checkedZone } from './checked-zone.ts';
import type { Declare } from './declare.ts';
import { date, decimal, whole } from './option-values.ts';
import { readInstant } from './read-instant.ts';
import { accepted, readScheme } from './read-input.ts';
import { Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';
import { table } from './table.ts';

type Options = {
  readonly lat?: number;
  readonly lon?: number;
  readonly zone?: string;
  readonly elevation?: number;
  readonly pressure?: number;
  readonly temperature?: number;
  readonly deltaT?: number;
  readonly at?: readonly string[];
  readonly on?: string;
  readonly step: number;
  readonly json?: true;
};

/** One row of `sun --json`: degrees and minutes; azimuth clockwise from true north. */
type Row = {
  readonly instant: string;
  readonly local: string;
  readonly azimuth: number;
  readonly altitude: number;
  readonly apparentAltitude: number;
  readonly equationOfTime: number;
};

const HELP = `
One of --at and --on says when; a scheme, or --lat, --lon and --zone, says where.
An instant without Z or an offset is a time of the clock in the zone.
Altitude is without refraction, apparent altitude with it. With --on, the text ends in sunrise, highest sun and sunset; JSON has the
rows alone.

Examples:
  shadewright sun scheme.json --on 2025-06-21
  shadewright sun --lat 51.45 --lon -2.59 --zone Europe/London --at 2025-06-21T12:00Z
  shadewright sun --lat -33.9 --lon 151.2 --zone Australia/Sydney --on 2025-12-21 --step 30 --json`;

/** Seconds as ISO 8601 has them: two digits, and thousandths only where there are any. */
const secondsText = (seconds: number): string =>
  Number.isInteger(seconds) ? String(seconds).padStart(2, '0') : seconds.toFixed(3).padStart(6, '0');

const utc = (instant_ms: number): string => new Date(instant_ms).toISOString().replace('.000Z', 'Z');

type Place = { readonly observer: Observer; readonly zone: string };

async function placeOf(path: string | undefined, options: Options, screen: Screen): Promise<Place> {
  const air = {
    ...(options.pressure === undefined ? {} : { pressure_hPa: options.pressure }),
    ...(options.temperature === undefined ? {} : { temperature_C: options.temperature }),
    ...(options.deltaT === undefined ? {} : { deltaT_s: options.deltaT }),
  };
  if (path !== undefined) {
    if (options.lat !== undefined || options.lon !== undefined)
      throw new Refusal('shadewright sun: both a scheme and --lat/--lon were given; give one of the two.');
    const { site } = (await readScheme(path, screen)).scheme;
    const zone = options.zone === undefined ? site.zone : await checkedZone(options.zone);
    const elevation_m = options.elevation ?? site.elevation;
    const observer = { latitude_deg: site.latitude, longitude_deg: site.longitude, elevation_m, ...air };
    return { zone, observer: accepted('shadewright sun', checkObserver(observer), screen) };
  }
  const { lat, lon, zone } = options;
  if (lat === undefined || lon === undefined || zone === undefined)
    throw new Refusal('shadewright sun: nothing says where; give a scheme, or all of --lat, --lon and --zone.');
  const observer = { latitude_deg: lat, longitude_deg: lon, elevation_m: options.elevation ?? 0, ...air };
  return { zone: await checkedZone(zone), observer: accepted('shadewright sun', checkObserver(observer), screen) };
}

/** The instants asked for; those of a civil day run in steps from its first moment, so that a day of 23 hours has 23 of them. */
async function instantsOf(options: Options, zone: string, screen: Screen): Promise<readonly number[]> {
  if ((options.at === undefined) === (options.on === undefined))
    throw new Refusal('shadewright sun: exactly one of --at and --on must say when; give --at INSTANT or --on DATE.');
  if (options.at) {
    const instants: number[] = [];
    for (const text of options.at) {
      const instant_ms = await readInstant(text, zone, (note) => screen.note(`note: ${note}\n`));
      instants.push(accepted(`--at ${text}`, checkInstant(instant_ms), screen));
    }
    return instants;
  }
  const { daySamples } = await import('../../core/sun/civil.ts');
  const { instant_ms: middles } = daySamples(options.on ?? '', zone, options.step);
  if (middles.length === 0)
    throw new Refusal(
      `shadewright sun: --on ${options.on} does not occur in ${zone}, whose clocks crossed the date line; give another day.`,
    );
  const step_ms = options.step * 60_000;
  const first_ms = (middles[0] ?? 0) - step_ms / 2;
  return Array.from(middles, (_middle, k) => first_ms + k * step_ms);
}

const asText = (rows: readonly Row[], place: Place): string => {
  const { latitude_deg, longitude_deg, elevation_m } = place.observer;
  return [
    `Sun at latitude ${latitude_deg}°, longitude ${longitude_deg}°, ${elevation_m} m; zone ${place.zone}`,
    'Azimuth clockwise from true north. Altitude without refraction, apparent altitude with it.',
    '',
    table(
      [
        { head: 'local time', align: 'left' },
        { head: 'azimuth °', align: 'right' },
        { head: 'altitude °', align: 'right' },
        { head: 'apparent °', align: 'right' },
        { head: 'eq. of time min', align: 'right' },
      ],
      rows.map((row) => [
        row.local,
        row.azimuth.toFixed(3),
        row.altitude.toFixed(3),
        row.apparentAltitude.toFixed(3),
        row.equationOfTime.toFixed(3),
      ]),
    ),
  ].join('\n');
};

/** A sign of the longitude that was turned round, or a zone from elsewhere, gives hours that nobody would notice to be wrong. */
async function noteOddZone({ observer, zone }: Place, instant_ms: number | undefined, screen: Screen): Promise<void> {
  const { zoneDisagrees } = await import('../../core/sun/zone-disagrees.ts');
  if (instant_ms === undefined || !zoneDisagrees(zone, observer.longitude_deg, instant_ms)) return;
  screen.note(
    `note: the clock of ${zone} stands more than three hours from the sun at longitude ${observer.longitude_deg}°; check the sign of the longitude, and the zone.\n`,
  );
}

/** Rise, highest point and set of a civil day, in words. */
async function dayText(day: string, { zone, observer }: Place): Promise<string> {
  const [{ sunEvents }, { civilOf }] = await Promise.all([
    import('../../core/sun/events.ts'),
    import('../../core/sun/civil.ts'),
  ]);
  const events = sunEvents(day, zone, observer);
  const time = (instant_ms: number | null): string => {
    if (instant_ms === null) return 'none';
    const civil = civilOf(instant_ms, zone);
    // Where summer nights are short, the sun of a day sets past midnight.
    return civil.date === day ? civil.time : `${civil.time} on ${civil.date}`;
  };
  const highest = `highest ${time(events.transit_ms)} at ${events.transitAltitude_deg.toFixed(2)}°`;
  if (events.state === 'never-rises') return `Polar night: the sun does not rise on this day; ${highest}.\n`;
  if (events.state === 'never-sets') return `Polar day: the sun does not set on this day; ${highest}.\n`;
  return `Sunrise ${time(events.sunrise_ms)}, ${highest}, sunset ${time(events.sunset_ms)}.\n`;
}

/** `shadewright sun`: where the sun stands, for a scheme's site or any place. */
export const declareSun: Declare = (program, screen) => {
  program
    .command('sun')
    .description('print where the sun stands at instants or through a day')
    .argument('[SCHEME]', 'the scheme whose site is meant')
    .option('--lat <D>', 'latitude in degrees, north positive', decimal)
    .option('--lon <D>', 'longitude in degrees, east positive', decimal)
    .option('--zone <Z>', 'time zone by its IANA name, such as Europe/London')
    .option('--elevation <M>', 'above sea level in metres', decimal)
    .option('--pressure <HPA>', 'station pressure in hPa, for refraction only', decimal)
    .option('--temperature <C>', 'air temperature in °C, for refraction only', decimal)
    .option('--delta-t <S>', 'terrestrial minus universal time in seconds', decimal)
    .option('--at <INSTANT...>', 'one instant or more, such as 2025-06-21T12:00Z')
    .option('--on <DATE>', 'a civil day', date)
    .addOption(new Option('--step <MIN>', 'between the rows of --on').argParser(whole(1, 720, 'minutes')).default(60))
    .option('--json', 'print JSON')
    .addHelpText('after', HELP)
    .action(async (path: string | undefined, options: Options) => {
      const place = await placeOf(path, options, screen);
      const instants = await instantsOf(options, place.zone, screen);
      await noteOddZone(place, instants[0], screen);
      const [{ sunPosition }, { civilOf }] = await Promise.all([
        import('../../core/sun/spa.ts'),
        import('../../core/sun/civil.ts'),
      ]);
      const rows = instants.map((instant_ms): Row => {
        const sun = sunPosition(instant_ms, place.observer);
        const civil = civilOf(instant_ms, place.zone);
        return {
          instant: utc(instant_ms),
          local: `${civil.date}T${civil.time}:${secondsText(civil.seconds)}${civil.offset}`,
          azimuth: sun.azimuth_deg,
          altitude: sun.altitude_deg,
          apparentAltitude: sun.apparentAltitude_deg,
          equationOfTime: sun.equationOfTime_min,
        };
      });
      if (options.json) screen.out(`${JSON.stringify(rows, null, 2)}\n`);
      else {
        const day = options.on === undefined ? '' : await dayText(options.on, place);
        screen.out(`${asText(rows, place)}${day}${CAUTIONS[3]}\n`);
      }
    });
};
