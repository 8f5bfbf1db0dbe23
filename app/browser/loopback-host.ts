import { readFile } from 'node:fs/promises';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { dispatch, HostFault } from '../contract/dispatch.ts';
import { contract, type Reply } from '../contract/host.ts';
import { PAGE_HEADERS } from '../contract/page-headers.ts';
import { decode, encode, LAUNCH_HEADER, SESSION_HEADER } from '../contract/wire.ts';
import { bundleFile } from '../files/bundle-file.ts';
import { type Dialogs, type FileHost, fileHost } from '../files/file-handlers.ts';
import { printDocument } from '../files/print-document.ts';
import { shipped } from '../files/shipped.ts';
import { Admission } from './admission.ts';
import { Presence } from './presence.ts';

const ADDRESS = '127.0.0.1';
/** A message holds one file of the host's largest size in base64, and little beside it. */
const MAX_MESSAGE_BYTES = 96 * 1024 * 1024;
/** How often a held answer says that it is still there, so that nothing between takes it for dead. */
const ALIVE_ms = 15_000;

type Setting = {
  /** 0: any free port. */
  readonly port: number;
  /** The scheme to open with. */
  readonly scheme?: string | undefined;
  /** The example, by key, to open with where there is no scheme. */
  readonly example?: string | undefined;
  /** Where recent files and unsaved work are kept. */
  readonly dataDir: string;
  readonly version: string;
  /** Called when the window has been closed: it held its request and then held none for some seconds. */
  readonly onWindowClosed?: () => void;
  /** How long after the last held request a window counts as closed [ms]; absent: longer than a reload takes. */
  readonly grace_ms?: number;
  readonly report?: (error: unknown) => void;
};

export type BrowserHost = {
  readonly port: number;
  /** The address for a window, with a launch token that works once. Taking it again ends the window before. */
  readonly newAddress: () => string;
  /** The address with the first launch token. */
  readonly url: string;
  readonly close: () => Promise<void>;
};

/** A browser lets only the page ask for a file: the page's bridge answers these channels and never sends them. */
const pageAsks = async (): Promise<never> => {
  throw new HostFault('forbidden', 'dialog:page');
};
const PAGE_DIALOGS: Dialogs = {
  openScheme: pageAsks,
  openWeather: pageAsks,
  saveScheme: pageAsks,
  saveExport: pageAsks,
};

/**
 * The body of a request up to the bound; null when it is longer. What is past the bound is read and let go, because a page hears
 * a refusal only when it has been allowed to finish; only the admitted window gets this far.
 */
async function bodyOf(request: IncomingMessage): Promise<string | null> {
  const parts: Buffer[] = [];
  let length = 0;
  for await (const part of request as AsyncIterable<Buffer>) {
    length += part.length;
    if (length > MAX_MESSAGE_BYTES) parts.length = 0;
    else parts.push(part);
  }
  return length > MAX_MESSAGE_BYTES ? null : Buffer.concat(parts).toString('utf8');
}

const headerOf = (request: IncomingMessage, name: string): string => {
  const value = request.headers[name];
  return typeof value === 'string' ? value : '';
};

/** Answers requests of one window on the loopback address. Every answer, refusals too, carries the page's headers. */
class Answers {
  readonly admission = new Admission();
  readonly presence: Presence;
  #files: FileHost;
  #screens: string;
  #report: (error: unknown) => void;
  /** `127.0.0.1:port`, known once the server listens. */
  authority = '';

  constructor(files: FileHost, screens: string, setting: Setting) {
    this.#files = files;
    this.#screens = screens;
    this.#report = setting.report ?? (() => undefined);
    this.presence = new Presence(() => setting.onWindowClosed?.(), setting.grace_ms);
  }

  async answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
    // A name that someone else's server resolves to this address carries that name here: only the number itself is ours.
    if (headerOf(request, 'host') !== this.authority) return this.#refuse(response, 403, 'wrong host');
    const path = (request.url ?? '/').split(/[?#]/, 1)[0] ?? '/';
    if (request.method === 'GET' || request.method === 'HEAD')
      return this.#file(path, request.method === 'HEAD', response);
    if (request.method !== 'POST') return this.#refuse(response, 405, 'GET and POST only');
    if (headerOf(request, 'origin') !== `http://${this.authority}`) return this.#refuse(response, 403, 'wrong origin');
    if (path === '/claim') return this.#claim(request, response);
    if (!this.admission.isAdmitted(headerOf(request, SESSION_HEADER))) return this.#refuse(response, 403, 'no session');
    if (path === '/stay') return this.#stay(response);
    if (path.startsWith('/host/')) return this.#call(path.slice('/host/'.length), request, response);
    return this.#refuse(response, 404, 'no such place');
  }

  #send(response: ServerResponse, status: number, type: string, body: string | Buffer): void {
    response.writeHead(status, { ...PAGE_HEADERS, 'content-type': type });
    response.end(body);
  }

  #reply(response: ServerResponse, status: number, reply: Reply<unknown>): void {
    this.#send(response, status, 'application/json; charset=utf-8', encode(reply));
  }

  #refuse(response: ServerResponse, status: number, message: string): void {
    // What is still being sent is not read, so the connection cannot serve another request.
    response.setHeader('connection', 'close');
    this.#reply(response, status, { ok: false, code: status === 403 ? 'forbidden' : 'bad-request', message });
  }

  async #file(path: string, isHead: boolean, response: ServerResponse): Promise<void> {
    const file = bundleFile(this.#screens, path);
    const bytes = file === null ? null : await readFile(file.path).catch(() => null);
    if (file === null || bytes === null)
      return this.#send(response, 404, 'text/plain; charset=utf-8', 'There is nothing here.');
    this.#send(response, 200, file.type, isHead ? '' : bytes);
  }

  #claim(request: IncomingMessage, response: ServerResponse): void {
    const session = this.admission.claim(headerOf(request, LAUNCH_HEADER));
    if (session === null) this.#refuse(response, 403, 'this address has been used already; start again for a new one');
    else this.#reply(response, 200, { ok: true, value: session });
  }

  #stay(response: ServerResponse): void {
    response.writeHead(200, { ...PAGE_HEADERS, 'content-type': 'text/plain; charset=utf-8' });
    response.write('\n');
    const alive = setInterval(() => response.write('\n'), ALIVE_ms);
    this.presence.arrive();
    response.once('close', () => {
      clearInterval(alive);
      this.presence.leave();
    });
  }

  async #call(channel: string, request: IncomingMessage, response: ServerResponse): Promise<void> {
    const text = await bodyOf(request);
    if (text === null) return this.#refuse(response, 413, 'the message is too large');
    let ask: unknown;
    try {
      ask = decode(text);
    } catch {
      return this.#refuse(response, 400, 'the message is not JSON');
    }
    this.#reply(response, 200, await dispatch(contract, this.#files.handlers, channel, ask, this.#report));
  }
}

async function listen(server: Server, port: number): Promise<number> {
  await new Promise<void>((listening, failed) => {
    server.once('error', failed);
    server.listen(port, ADDRESS, listening);
  });
  return (server.address() as AddressInfo).port;
}

/**
 * Serves the built screens and the contract on the loopback address to one window of a browser.
 * @throws when the port is taken or the address is refused
 */
export async function startBrowserHost(setting: Setting): Promise<BrowserHost> {
  const { dataDir, version, scheme, example } = setting;
  const files = fileHost({
    kind: 'browser',
    version,
    dataDir,
    startWith: scheme ?? null,
    example,
    dialogs: PAGE_DIALOGS,
    pdf: printDocument,
  });
  const answers = new Answers(files, shipped('out', 'renderer'), setting);
  const server = createServer((request, response) => {
    answers.answer(request, response).catch((error: unknown) => {
      setting.report?.(error);
      response.destroy();
    });
  });
  server.headersTimeout = 10_000;
  const port = await listen(server, setting.port);
  answers.authority = `${ADDRESS}:${port}`;
  const address = (token: string) => `http://${answers.authority}/#t=${token}`;
  return {
    port,
    url: address(answers.admission.launch ?? ''),
    newAddress: () => address(answers.admission.renew()),
    close: async () => {
      answers.presence.stop();
      const closed = new Promise<void>((done) => server.close(() => done()));
      server.closeAllConnections();
      await closed;
      answers.presence.stop();
    },
  };
}
