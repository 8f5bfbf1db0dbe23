import { request } from 'node:http';
import type { IpcMainInvokeEvent } from 'electron';
import { onTestFinished } from 'vitest';
import { type BrowserHost, startBrowserHost } from '../../app/browser/loopback-host.ts';
import { dispatch } from '../../app/contract/dispatch.ts';
import { decode, encode, LAUNCH_HEADER, SESSION_HEADER } from '../../app/contract/wire.ts';
import { serve } from '../../app/desktop/serve.ts';
import { PAGE_URL } from '../../app/desktop/page-protocol.ts';
import { type Dialogs, fileHost } from '../../app/files/file-handlers.ts';
import { printDocument } from '../../app/files/print-document.ts';

export type Answered = {
  readonly ok: boolean;
  readonly value?: unknown;
  readonly code?: string;
  readonly message?: string;
};
export type Client = (channel: string, ask: unknown) => Promise<Answered>;
export type Heard = {
  readonly status: number;
  readonly headers: { readonly [header: string]: unknown };
  readonly text: string;
};

/** One HTTP request with every header under the test's control, which `fetch` does not allow. */
export function send(
  port: number,
  method: string,
  path: string,
  headers: Record<string, string> = {},
  body = '',
): Promise<Heard> {
  return new Promise((settle, fail) => {
    const asked = request(
      { host: '127.0.0.1', port, method, path, headers, setHost: false, agent: false },
      (response) => {
        const parts: Buffer[] = [];
        response.on('data', (part: Buffer) => parts.push(part));
        response.on('end', () =>
          settle({
            status: response.statusCode ?? 0,
            headers: response.headers,
            text: Buffer.concat(parts).toString('utf8'),
          }),
        );
      },
    );
    asked.on('error', fail);
    asked.end(body);
  });
}

/** Headers that the host's own page would send. */
export const pageHeaders = (port: number, more: Record<string, string> = {}): Record<string, string> => ({
  host: `127.0.0.1:${port}`,
  origin: `http://127.0.0.1:${port}`,
  ...more,
});

export const launchToken = (url: string): string => new URLSearchParams(new URL(url).hash.slice(1)).get('t') ?? '';

/** Trades a launch token for the session that every later call carries. */
export async function claim(host: BrowserHost): Promise<string> {
  const heard = await send(
    host.port,
    'POST',
    '/claim',
    pageHeaders(host.port, { [LAUNCH_HEADER]: launchToken(host.url) }),
  );
  return (decode(heard.text) as { value: string }).value;
}

type Options = { readonly dataDir: string; readonly scheme?: string; readonly example?: string };

/** A running loopback host that ends with the test. */
export async function runningHost(
  options: Options & { readonly onWindowClosed?: () => void; readonly grace_ms?: number },
): Promise<BrowserHost> {
  const host = await startBrowserHost({ port: 0, version: '0.0.0', ...options });
  onTestFinished(() => host.close());
  return host;
}

/** Speaks to a loopback host as its page does. */
export async function browserClient(options: Options): Promise<Client> {
  const host = await runningHost(options);
  const session = await claim(host);
  return async (channel, ask) => {
    const headers = pageHeaders(host.port, { [SESSION_HEADER]: session, 'content-type': 'application/json' });
    return decode((await send(host.port, 'POST', `/host/${channel}`, headers, encode(ask))).text) as Answered;
  };
}

const cancelled = async (): Promise<null> => null;
export const NO_DIALOGS: Dialogs = {
  openScheme: cancelled,
  openWeather: cancelled,
  saveScheme: cancelled,
  saveExport: cancelled,
};

/** A frame of the desk's own page, as main would see it. */
export const ourFrame = { senderFrame: { parent: null, url: PAGE_URL } } as unknown as IpcMainInvokeEvent;

type Handle = (event: IpcMainInvokeEvent, ask: unknown) => Promise<Answered>;

/** Main's side of the desktop without Electron: the handlers that `serve` registers, by channel. */
export function desktopHandles(
  { dataDir, scheme, example }: Options,
  dialogs: Dialogs = NO_DIALOGS,
): Map<string, Handle> {
  const files = fileHost({
    kind: 'desktop',
    version: '0.0.0',
    dataDir,
    startWith: scheme ?? null,
    example,
    dialogs,
    pdf: printDocument,
  });
  const handles = new Map<string, Handle>();
  const ipc = { handle: (channel: string, handle: unknown) => void handles.set(channel, handle as Handle) };
  const own = {
    'desk:dropped': ({ path }: { path: string }) => files.openChosen(path),
    'desk:unsaved': async () => null,
  };
  serve(ipc, files.handlers, own, () => undefined);
  return handles;
}

/** Speaks to the desktop's main as its preload does. */
export async function desktopClient(options: Options, dialogs?: Dialogs): Promise<Client> {
  const handles = desktopHandles(options, dialogs);
  return async (channel, ask) => {
    const handle = handles.get(channel);
    return handle ? handle(ourFrame, ask) : ((await dispatch({}, {}, channel, ask, () => undefined)) as Answered);
  };
}
