import * as z from 'zod';

/** What the hosts keep in the settings folder between runs. Read with the same distrust as anything else on a disk. */

/** Schemes opened or saved last, newest first. */
export const RecentList = z.array(z.object({ path: z.string().min(1).max(4096), opened: z.iso.datetime() })).max(100);

/** One document's unsaved work. */
export const StoredSlot = z.object({
  name: z.string().max(400),
  saved: z.iso.datetime(),
  bytes: z.custom<Uint8Array>((v) => v instanceof Uint8Array),
});
export type StoredSlot = z.output<typeof StoredSlot>;
