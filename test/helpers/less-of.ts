import type { SchemeEdit } from '../../core/scheme/edit.ts';
import type { WayThatPasses } from '../../core/sizing/ways.ts';

/** An edit with every number of a lever moved by a share, as a person would who builds a little less of it. */
function scaled(edit: SchemeEdit, by: number, isMoved: (value: unknown, field: string) => boolean): SchemeEdit {
  if (edit.kind === 'together') return { ...edit, edits: edit.edits.map((e) => scaled(e, by, isMoved)) };
  const moved = (value: unknown, field: string): unknown => (isMoved(value, field) ? (value as number) * by : value);
  if (edit.kind === 'set') return { ...edit, value: moved(edit.value, edit.field) };
  if (edit.kind === 'add') {
    const entry = Object.entries(edit.entry as object).map(([field, value]) => [field, moved(value, field)]);
    return { ...edit, entry: Object.fromEntries(entry) };
  }
  return edit;
}

/** One per cent less of a way: a shallower device, glass that lets more in, wider windows, a blind that closes later. */
export function less({ lever, edit, amount }: WayThatPasses): SchemeEdit {
  if (lever === 'area') return scaled(edit, 1.01, (_, field) => field === 'width');
  const by = lever === 'glass' || lever === 'blind' ? 1.01 : 0.99;
  return scaled(edit, by, (value) => value === amount);
}
