import type { Channel } from './host.ts';

/** The names of the contract's channels, apart from their forms: the preload and the page need no validators. */
export const CHANNELS = [
  'host:hello',
  'scheme:demo',
  'scheme:open',
  'scheme:reopen',
  'scheme:save',
  'scheme:save-as',
  'scheme:recent',
  'scheme:autosave',
  'scheme:recover',
  'scheme:discard',
  'export:write',
  'sheet:pdf',
  'sheet:png',
  'weather:open',
  'place:search',
] as const satisfies readonly Channel[];

/** What passes between the desktop's preload and main beside the contract. */
export const DESK_EVENT = 'desk:event';
export const DESK_DROPPED = 'desk:dropped';
export const DESK_UNSAVED = 'desk:unsaved';
