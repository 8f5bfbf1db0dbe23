import * as z from 'zod';

/** An opaque name for a file that the user chose: the page never sees a path. */
export const FileId = z.string().min(8).max(80).brand<'FileId'>();
export type FileId = z.output<typeof FileId>;

/** The largest file that a host reads or writes for the page. */
export const MAX_BYTES = 64 * 1024 * 1024;

const Bytes = z.custom<Uint8Array>(
  (v) => v instanceof Uint8Array && v.byteLength <= MAX_BYTES,
  'not bytes, or too many',
);
export const Opened = z.object({ id: FileId, name: z.string(), bytes: Bytes });
export type Opened = z.output<typeof Opened>;
/** Which document a slot of unsaved work belongs to. */
export const SlotKey = z
  .string()
  .min(1)
  .max(80)
  .regex(/^[\w-]+$/);
const SafeName = z
  .string()
  .min(1)
  .max(120)
  .regex(/^[^\\/\0]+$/);

/**
 * The only channels that exist between the screens and what is privileged. Electron's main and preload, the loopback host and
 * their shared tests are all derived from this table.
 *
 * Dialogs belong to whoever can show one. On the desktop main shows the system's own. A browser lets only the page ask for a
 * file, so there the page's bridge answers the channels of `PAGE_DIALOGS` itself (file input or picker; download or writable
 * handle) under ids of its own that begin with `page-`, and keeps save and reopen of those ids to itself as well. The loopback
 * host answers these channels with `forbidden`, `dialog:page`. Everything else goes to the host: a scheme named on the
 * command line has a host id, and saving it writes the real file.
 */
export const contract = {
  /** What this host is, and the scheme or the example (by key) that it was started with; null: none. */
  'host:hello': {
    ask: z.null(),
    reply: z.object({
      kind: z.enum(['desktop', 'browser']),
      version: z.string(),
      opened: Opened.nullable(),
      example: z.string().nullable(),
      demos: z.array(z.object({ key: z.string(), name: z.string() })),
    }),
  },
  /** A shipped example, as a fresh untitled scheme: it has no file to save over. */
  'scheme:demo': { ask: z.object({ key: z.string().max(80) }), reply: z.object({ name: z.string(), bytes: Bytes }) },
  /** The system's open dialog. Null: the user thought better of it. */
  'scheme:open': { ask: z.null(), reply: Opened.nullable() },
  'scheme:reopen': { ask: z.object({ id: FileId }), reply: Opened },
  'scheme:save': { ask: z.object({ id: FileId, bytes: Bytes }), reply: z.null() },
  'scheme:save-as': {
    ask: z.object({ name: SafeName, bytes: Bytes }),
    reply: z.object({ id: FileId, name: z.string() }).nullable(),
  },
  'scheme:recent': { ask: z.null(), reply: z.array(z.object({ id: FileId, name: z.string(), opened: z.string() })) },
  /** Kept beside the settings, not beside the scheme; one slot a document key. */
  'scheme:autosave': {
    ask: z.object({
      key: SlotKey,
      name: SafeName,
      bytes: Bytes,
    }),
    reply: z.null(),
  },
  'scheme:recover': {
    ask: z.null(),
    reply: z.array(z.object({ key: z.string(), name: z.string(), saved: z.string(), bytes: Bytes })),
  },
  'scheme:discard': {
    ask: z.object({
      key: SlotKey,
    }),
    reply: z.null(),
  },
  /** Write a finished export (PDF, SVG, CSV, JSON …) where the user says. Null: cancelled. */
  'export:write': { ask: z.object({ name: SafeName, bytes: Bytes }), reply: z.object({ name: z.string() }).nullable() },
  /** A weather file that the user chooses; it is read where the page is, and only its name, hash and mapping are kept. */
  'weather:open': { ask: z.null(), reply: z.object({ name: z.string(), bytes: Bytes }).nullable() },
  /** Places of the bundled gazetteer whose name begins with a text. `zone` is a suggestion, null where none is known. */
  'place:search': {
    ask: z.object({ text: z.string().max(120) }),
    reply: z.object({
      /** To be shown beside the places: their licence asks for it. */
      credit: z.string(),
      places: z
        .array(
          z.object({
            name: z.string(),
            /** ISO 3166 code. */
            country: z.string(),
            region: z.string(),
            latitude: z.number(),
            longitude: z.number(),
            zone: z.string().nullable(),
          }),
        )
        .max(12),
    }),
  },
  /** PDF pages from a drawing document (core/sheet): fonts and pdfkit live with the host. */
  'sheet:pdf': { ask: z.object({ document: z.unknown() }), reply: z.object({ bytes: Bytes }) },
  /** The first page of a drawing document as an image, with the fonts of the PDF. */
  'sheet:png': {
    ask: z.object({ document: z.unknown(), dpi: z.number().min(36).max(1200) }),
    reply: z.object({ bytes: Bytes }),
  },
} as const;

export type Channel = keyof typeof contract;

/** Channels that need a dialog: the browser's page answers them itself. */
export const PAGE_DIALOGS = [
  'scheme:open',
  'scheme:save-as',
  'export:write',
  'weather:open',
] as const satisfies readonly Channel[];

export type Ask<C extends Channel> = z.output<(typeof contract)[C]['ask']>;
export type Answer<C extends Channel> = z.output<(typeof contract)[C]['reply']>;
export type Reply<T> =
  | { ok: true; value: T }
  | { ok: false; code: 'forbidden' | 'bad-request' | 'io'; message: string };
export type Host = { [C in Channel]: (ask: Ask<C>) => Promise<Reply<Answer<C>>> };

/** What a menu or a shortcut of the host may ask of the screens. */
export const DESK_COMMANDS = ['open', 'save', 'save-as', 'undo', 'redo', 'about'] as const;
export type DeskCommand = (typeof DESK_COMMANDS)[number];

/** What reaches the screens unasked: a menu's command, or a scheme that the system handed over (double click, second start). */
export type DeskEvent =
  | { readonly kind: 'command'; readonly command: DeskCommand }
  | { readonly kind: 'opened'; readonly opened: Opened };

/** `window.shadewright` on the desktop, put there by the preload and frozen; absent in a browser. */
export type Bridge = {
  readonly host: Host;
  /** Hears what the host says unasked; returns the way to stop. */
  readonly listen: (hear: (event: DeskEvent) => void) => () => void;
  /** A file that the user dropped on the window; a file that a script made has no path and is refused. */
  readonly dropped: (file: unknown) => Promise<Reply<Opened>>;
  /** Tells the host whether there is unsaved work, so that closing asks first. */
  readonly setUnsaved: (isUnsaved: boolean) => void;
};
