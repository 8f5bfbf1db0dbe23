import type { Model } from '../form/model.ts';
import { stands } from '../form/stands.ts';
import type { LimitSet } from '../limits/limit-set.ts';
import { needsWeather } from '../limits/metric.ts';
import type { Fault } from '../scheme/fault.ts';
import { DEFAULT_YEAR, type Scheme } from '../scheme/schema.ts';
import { checkObserver } from '../sun/check-observer.ts';
import { zoneDisagrees } from '../sun/zone-disagrees.ts';
import { windowPlaceNotes } from './covered-windows.ts';
import { SLIVER_m2 } from '../units/tolerance.ts';

const warning = (code: string, place: string, message: string, cure: string): Fault => ({
  level: 'warning',
  code,
  place,
  message,
  cure,
});

/** Said so that "nothing over" is not read as "all within". */
const NO_ROOMS = warning(
  'no-rooms',
  'rooms',
  'the scheme has no rooms, so nothing was checked',
  'add the rooms and their windows',
);

/**
 * What the reader of a check should know about it: rooms that no gain can be worked out for, limits that apply to nothing,
 * glass outside the fit, a site at a pole or with a clock from elsewhere, a hottest day that was assumed. Faults of the scheme's own making are the loader's to find.
 */
export function checkNotes(
  scheme: Scheme,
  model: Model,
  limitSet: LimitSet | null,
  hasWeather: boolean,
): readonly Fault[] {
  return [
    ...(scheme.rooms.length === 0 ? [NO_ROOMS] : []),
    ...model.rooms.flatMap((room) => roomNotes(room, scheme)),
    ...windowPlaceNotes(model),
    ...scheme.glass.flatMap((glass, i) => glassNotes(glass, `glass[${i}]`)),
    ...scheme.devices.flatMap((device, i) => deviceNotes(device, `devices[${i}]`)),
    ...(limitSet ? limitNotes(limitSet, model) : []),
    ...(limitSet && !hasWeather ? weatherNotes(limitSet) : []),
    ...siteNotes(scheme),
  ];
}

function roomNotes(room: Model['rooms'][number], scheme: Scheme): Fault[] {
  const notes: Fault[] = [];
  const name = `room ${room.id}`;
  if (!(room.floor_m2 > SLIVER_m2)) {
    const message = `${name} has no floor area, so nothing can be set against it`;
    notes.push(warning('no-floor', room.place, message, 'give its box a width and depth, or its outline some area'));
  }
  const block = scheme.blocks.find((b) => b.id === room.block);
  if (block && !stands(block.standing, 'after')) {
    const message = `${name} is in a block that is removed; it is checked as if the block were there no more`;
    notes.push(warning('room-removed', room.place, message, 'take the room out, or change the standing of its block'));
  }
  if (room.windows.length === 0) {
    const outside = room.walls.some((w) => w.outside);
    const message = outside
      ? `${name} has no window, so no limit on gain applies to it`
      : `${name} has no window and no outside wall, so no limit on gain applies to it`;
    const cure = outside
      ? 'add its windows, or leave it out'
      : 'draw it up to the face of its block, or leave it out if it lies inside';
    notes.push(warning(outside ? 'no-window' : 'no-outside-wall', room.place, message, cure));
  }
  return notes;
}

function glassNotes(glass: Scheme['glass'][number], place: string): Fault[] {
  const notes: Fault[] = [];
  if (glass.g > 0.9)
    notes.push(
      warning(
        'unlikely',
        `${place}.g`,
        `a g of ${glass.g} is above that of a single clear pane, about 0.87`,
        'check it: g is a share, at normal incidence, of the pane without its frame',
      ),
    );
  if (glass.light > 0 && glass.light / glass.g > 2.3)
    notes.push(
      warning(
        'unlikely',
        `${place}.light`,
        `light ${glass.light} to g ${glass.g} is more than the spectrum of daylight allows, about 2.2`,
        'check both against the same data sheet',
      ),
    );
  return notes;
}

function deviceNotes(device: Scheme['devices'][number], place: string): Fault[] {
  const open =
    device.kind === 'blind' &&
    device.closedAbove === undefined &&
    device.closedFrom === undefined &&
    device.closedTo === undefined;
  if (!open) return [];
  const message = `blind ${device.id} never closes, since it says neither when nor above what`;
  return [
    warning('blind-open', place, message, 'add "closedAbove": 200 (W/m² on the glass), or closedFrom and closedTo'),
  ];
}

function limitNotes(set: LimitSet, model: Model): Fault[] {
  const notes: Fault[] = [];
  for (const [i, limit] of set.limits.entries()) {
    const uses = limit.uses;
    if (!uses || model.rooms.length === 0 || model.rooms.some((r) => r.windows.length > 0 && uses.includes(r.use)))
      continue;
    const message = `no room with a window has a use that limit ${limit.id} of set ${set.id} is for (${uses.join(', ')})`;
    notes.push(
      warning('limit-unused', `limits[${i}].uses`, message, 'check the uses of the rooms, or choose another set'),
    );
  }
  if (set.example) {
    const message = `the limit set ${set.id} is an example`;
    notes.push(
      warning(
        'example-limits',
        'limits',
        message,
        'check your local code, and write its values into a set of your own',
      ),
    );
  }
  return notes;
}

/** Limits that could not be looked at for want of a year of weather: a room is not within what was never read. */
function weatherNotes(set: LimitSet): Fault[] {
  return set.limits.flatMap((limit, i) =>
    needsWeather(limit.metric)
      ? [
          warning(
            'needs-weather',
            `limits[${i}].metric`,
            `limit ${limit.id} looks at a year of weather and was left out: no weather file was given`,
            'give the weather file, or take the limit out of the set',
          ),
        ]
      : [],
  );
}

function siteNotes(scheme: Scheme): Fault[] {
  return [...placeNotes(scheme), ...hottestNotes(scheme)];
}

/** A pole, where bearings lose their usual meaning, and a clock that the sun of the place does not keep. */
function placeNotes({ site, year }: Scheme): Fault[] {
  const atPole = checkObserver({
    latitude_deg: site.latitude,
    longitude_deg: site.longitude,
    elevation_m: site.elevation,
  });
  const notes = atPole.ok ? atPole.notes.map((note) => ({ ...note, place: `site.${note.place}` })) : [];
  if (!zoneDisagrees(site.zone, site.longitude, Date.UTC(year ?? DEFAULT_YEAR, 5, 21))) return notes;
  const message = `the clock of ${site.zone} stands more than three hours from the sun at longitude ${site.longitude}°`;
  return [...notes, warning('odd-zone', 'site.zone', message, 'check the sign of the longitude, and the zone')];
}

function hottestNotes(scheme: Scheme): Fault[] {
  if (scheme.site.hottest) return [];
  const message =
    'the hottest design day has no temperatures of its own; 30 °C with a range of 10 K is taken (gain does not depend on it)';
  return [
    warning(
      'assumed',
      'site.hottest',
      message,
      'add "hottest": { "maximum": …, "range": … } from the local design data',
    ),
  ];
}
