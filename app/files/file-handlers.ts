import { basename } from 'node:path';
import { type Handlers, HostFault } from '../contract/dispatch.ts';
import { type FileId, MAX_BYTES, type Opened } from '../contract/host.ts';
import { listDemos, readDemo } from './demos.ts';
import { findPlaces } from './find-places.ts';
import { GrantedFiles } from './granted-files.ts';
import { readBounded } from './read-bounded.ts';
import { imageDocument } from './print-document.ts';
import { RecentFiles } from './recent-files.ts';
import { Recovery } from './recovery.ts';
import { saveAtomic } from './save-atomic.ts';
import { writeReason } from './write-reason.ts';

/** How a host asks the user for a file: a path that the user chose, or null when the user thought better of it. */
export type Dialogs = {
  readonly openScheme: () => Promise<string | null>;
  readonly openWeather: () => Promise<string | null>;
  readonly saveScheme: (name: string) => Promise<string | null>;
  readonly saveExport: (name: string) => Promise<string | null>;
};

export type FileHost = {
  readonly handlers: Handlers;
  /** Opens a file that the user chose outside the page: command line, double click, drop. @throws HostFault */
  readonly openChosen: (path: string) => Promise<Opened>;
};

type Setting = {
  readonly kind: 'desktop' | 'browser';
  readonly version: string;
  readonly dataDir: string;
  /** The scheme that the host was started with. */
  readonly startWith: string | null;
  /** The example, by key, that it was started with. */
  readonly example?: string | null | undefined;
  readonly dialogs: Dialogs;
  readonly pdf: (document: unknown) => Promise<Uint8Array>;
};

async function write(path: string, name: string, bytes: Uint8Array): Promise<void> {
  try {
    await saveAtomic(path, bytes);
  } catch (error) {
    throw new HostFault('io', `${name} was not saved: ${writeReason(error)}. What was there before is untouched.`);
  }
}

/** Everything of the contract that is files and no window: the same code behind the desktop and the loopback host. */
export function fileHost({ kind, version, dataDir, startWith, example, dialogs, pdf }: Setting): FileHost {
  const granted = new GrantedFiles();
  const recent = new RecentFiles(dataDir);
  const recovery = new Recovery(dataDir);
  /** A list of recent files that cannot be written must not stop the work. */
  const remember = (path: string) => recent.remember(path).catch(() => undefined);

  async function read(id: FileId): Promise<Opened> {
    const file = granted.find(id);
    if (!file) throw new HostFault('forbidden', 'this file was not opened here');
    const outcome = await readBounded(file.path, MAX_BYTES);
    if (!outcome.ok) throw new HostFault('io', `${file.name} was not opened: ${outcome.fault.message}`);
    await remember(file.path);
    return { id, name: file.name, bytes: outcome.bytes };
  }

  async function openChosen(path: string): Promise<Opened> {
    const chosen = await granted.grant(path).catch(() => null);
    if (!chosen) throw new HostFault('io', 'the file was not opened: its folder is no longer there');
    return read(chosen.id);
  }

  async function recentGrants() {
    const list = await Promise.all(
      (await recent.list()).map(async ({ path, opened }) => ({
        opened,
        grant: await granted.grant(path).catch(() => null),
      })),
    );
    return list.flatMap(({ opened, grant }) => (grant ? [{ ...grant, opened }] : []));
  }

  const handlers: Handlers = {
    'host:hello': async () => {
      // Whoever started the host has been told already that a scheme does not open; the desk opens all the same.
      const opened = startWith === null ? null : await openChosen(startWith).catch(() => null);
      return { kind, version, opened, example: example ?? null, demos: [...(await listDemos())] };
    },
    'scheme:demo': async ({ key }) => {
      const demo = await readDemo(key);
      if (!demo) throw new HostFault('bad-request', 'there is no such example');
      return demo;
    },
    'scheme:open': async () => {
      const path = await dialogs.openScheme();
      return path === null ? null : openChosen(path);
    },
    'scheme:reopen': ({ id }) => read(id),
    'scheme:save': async ({ id, bytes }) => {
      const file = granted.find(id);
      if (!file) throw new HostFault('forbidden', 'this file was not opened here');
      await write(file.path, file.name, bytes);
      await remember(file.path);
      return null;
    },
    'scheme:save-as': async ({ name, bytes }) => {
      const path = await dialogs.saveScheme(name);
      if (path === null) return null;
      const chosen = await granted.grant(path);
      await write(granted.find(chosen.id)?.path ?? path, chosen.name, bytes);
      await remember(path);
      return chosen;
    },
    'scheme:recent': recentGrants,
    'scheme:autosave': async ({ key, name, bytes }) => {
      await recovery.keep(key, name, bytes);
      return null;
    },
    'scheme:recover': async () => [...(await recovery.list())],
    'scheme:discard': async ({ key }) => {
      await recovery.discard(key);
      return null;
    },
    'export:write': async ({ name, bytes }) => {
      const path = await dialogs.saveExport(name);
      if (path === null) return null;
      const chosen = await granted.grant(path);
      await write(granted.find(chosen.id)?.path ?? path, chosen.name, bytes);
      return { name: chosen.name };
    },
    'weather:open': async () => {
      const path = await dialogs.openWeather();
      if (path === null) return null;
      const name = basename(path);
      const outcome = await readBounded(path, MAX_BYTES);
      if (!outcome.ok) throw new HostFault('io', `${name} was not opened: ${outcome.fault.message}`);
      return { name, bytes: outcome.bytes };
    },
    'place:search': ({ text }) => findPlaces(text),
    'sheet:pdf': async ({ document }) => ({ bytes: await pdf(document) }),
    'sheet:png': async ({ document, dpi }) => ({ bytes: await imageDocument(document, dpi) }),
  };
  return { handlers, openChosen };
}
