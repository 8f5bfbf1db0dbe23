import * as z from 'zod';
import { Opened } from './host.ts';

/** Channels that only the desktop's preload uses; the page reaches them through `Bridge` and never names a path. */
export const desktopOnly = {
  /** The path comes from the system by way of the preload: a file that a script made has none. */
  'desk:dropped': { ask: z.object({ path: z.string().min(1).max(4096) }), reply: Opened },
  'desk:unsaved': { ask: z.boolean(), reply: z.null() },
} as const;
