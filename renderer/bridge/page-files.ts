import type { Answer, Ask, FileId, Host, Reply } from '../../app/contract/host.ts';

/**
 * Files for a page in a browser: the browser's own dialogs choose them, and the page keeps the handles that it was granted under
 * names of its own. Where the browser has no such dialogs, opening goes through a file field and writing through a download;
 * a download has no handle, so a later save asks again.
 */
type Handle = {
  readonly name: string;
  getFile(): Promise<File>;
  createWritable(): Promise<{ write(bytes: Uint8Array): Promise<void>; close(): Promise<void> }>;
};
type Pickers = {
  showOpenFilePicker?(options: object): Promise<Handle[]>;
  showSaveFilePicker?(options: object): Promise<Handle>;
};

const PREFIX = 'page-file-';
const handles = new Map<FileId, Handle>();
const pickers = window as unknown as Pickers;

const keep = (handle: Handle): FileId => {
  const id = `${PREFIX}${handles.size + 1}` as FileId;
  handles.set(id, handle);
  return id;
};

const fine = <T>(value: T): Reply<T> => ({ ok: true, value });

/** A dialog that was closed is no fault: null. Anything else is. */
const refused = (error: unknown): Reply<null> => {
  if (error instanceof DOMException && error.name === 'AbortError') return fine(null);
  return { ok: false, code: 'io', message: error instanceof Error ? error.message : String(error) };
};

const bytesOf = async (file: File): Promise<Uint8Array> => new Uint8Array(await file.arrayBuffer());

function openByField(accept: string): Promise<File | null> {
  return new Promise((settle) => {
    const field = document.createElement('input');
    field.type = 'file';
    field.accept = accept;
    field.onchange = () => settle(field.files?.[0] ?? null);
    field.oncancel = () => settle(null);
    field.click();
  });
}

async function open(): Promise<Reply<Answer<'scheme:open'>>> {
  try {
    if (pickers.showOpenFilePicker === undefined) {
      const file = await openByField('.json,application/json');
      if (file === null) return fine(null);
      const id = `${PREFIX}none-${handles.size}` as FileId;
      return fine({ id, name: file.name, bytes: await bytesOf(file) });
    }
    const [handle] = await pickers.showOpenFilePicker({
      types: [{ description: 'Scheme', accept: { 'application/json': ['.json'] } }],
    });
    if (handle === undefined) return fine(null);
    const file = await handle.getFile();
    return fine({ id: keep(handle), name: handle.name, bytes: await bytesOf(file) });
  } catch (error) {
    return refused(error);
  }
}

/** A weather file: read once and not kept, so that a plain file field serves every browser. */
async function openWeather(): Promise<Reply<Answer<'weather:open'>>> {
  try {
    const file = await openByField('.csv,.txt,.tsv,text/csv,text/plain');
    return fine(file === null ? null : { name: file.name, bytes: await bytesOf(file) });
  } catch (error) {
    return refused(error);
  }
}

async function writeTo(handle: Handle, bytes: Uint8Array): Promise<void> {
  const out = await handle.createWritable();
  await out.write(bytes);
  await out.close();
}

function download(name: string, bytes: Uint8Array): void {
  const address = URL.createObjectURL(new Blob([bytes as Uint8Array<ArrayBuffer>]));
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}

async function writeWhereAsked(name: string, bytes: Uint8Array): Promise<Reply<{ id: FileId; name: string } | null>> {
  try {
    if (pickers.showSaveFilePicker === undefined) {
      download(name, bytes);
      return fine({ id: `${PREFIX}none-${handles.size}` as FileId, name });
    }
    const handle = await pickers.showSaveFilePicker({ suggestedName: name });
    await writeTo(handle, bytes);
    return fine({ id: keep(handle), name: handle.name });
  } catch (error) {
    return refused(error);
  }
}

async function save({ id, bytes }: Ask<'scheme:save'>): Promise<Reply<null>> {
  const handle = handles.get(id);
  if (handle === undefined) return { ok: false, code: 'forbidden', message: 'this file was not opened for writing' };
  try {
    await writeTo(handle, bytes);
    return fine(null);
  } catch (error) {
    return refused(error);
  }
}

/** The host of a browser page with the page's own dialogs put in front of it. */
export function withPageFiles(host: Host): Host {
  return Object.freeze({
    ...host,
    'scheme:open': open,
    'weather:open': openWeather,
    'scheme:save-as': ({ name, bytes }: Ask<'scheme:save-as'>) => writeWhereAsked(name, bytes),
    'export:write': ({ name, bytes }: Ask<'export:write'>) => writeWhereAsked(name, bytes),
    'scheme:save': (ask: Ask<'scheme:save'>) => (ask.id.startsWith(PREFIX) ? save(ask) : host['scheme:save'](ask)),
  });
}

/** Whether saving over this file can work: a file that came through a plain field or went out as a download cannot be. */
export const canSaveOver = (id: FileId): boolean => !id.startsWith(PREFIX) || handles.has(id);
