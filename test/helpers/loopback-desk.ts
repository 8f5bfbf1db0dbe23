import { randomUUID } from 'node:crypto';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import { copyFile, mkdtemp, readFile, rm } from 'node:fs/promises';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { extname, join, resolve } from 'node:path';
import { type Browser, chromium, type Page } from 'playwright-core';
import { dispatch } from '../../app/contract/dispatch.ts';
import { contract } from '../../app/contract/host.ts';
import { PAGE_HEADERS } from '../../app/contract/page-headers.ts';
import { decode, encode, SESSION_HEADER } from '../../app/contract/wire.ts';
import { fileHost } from '../../app/files/file-handlers.ts';
import { printDocument } from '../../app/files/print-document.ts';

const root = resolve(import.meta.dirname, '../..');
const MIME: { readonly [ending: string]: string } = {
  '.html': 'text/html',
  '.js': 'text/javascript',
  '.css': 'text/css',
  '.ttf': 'font/ttf',
  '.wasm': 'application/wasm',
};

export type LoopbackDesk = {
  readonly page: Page;
  /** The scheme's file on disk. */
  readonly scheme: string;
  /** What the page complained of: errors, warnings, refusals by the content policy. */
  readonly complaints: readonly string[];
  readonly close: () => Promise<void>;
};

const neverAsked = async (): Promise<null> => {
  throw new Error('a browser’s page asks for files itself');
};

async function bodyOf(request: IncomingMessage): Promise<string> {
  const parts: Buffer[] = [];
  for await (const part of request) parts.push(part as Buffer);
  return Buffer.concat(parts).toString('utf8');
}

/**
 * The built desk in Chromium over the loopback address, with the real handlers, contract and headers behind it, on a copy of a
 * shipped scheme.
 * @param executable path of the browser; @param demo key of the scheme; @param dark the system's theme
 */
export async function openLoopbackDesk(executable: string, demo: string, dark = false): Promise<LoopbackDesk> {
  const folder = await mkdtemp(join(tmpdir(), 'desk-'));
  const scheme = join(folder, `${demo}.scheme.json`);
  await copyFile(resolve(root, `assets/demo/${demo}.scheme.json`), scheme);
  const dialogs = {
    openScheme: neverAsked,
    openWeather: neverAsked,
    saveScheme: neverAsked,
    saveExport: neverAsked,
  };
  const files = fileHost({
    kind: 'browser',
    version: '0.0.0',
    dataDir: folder,
    startWith: scheme,
    dialogs,
    pdf: printDocument,
  });
  const session = randomUUID();
  const failures: unknown[] = [];
  const answer = async (request: IncomingMessage, response: ServerResponse): Promise<void> => {
    const path = new URL(request.url ?? '/', 'http://127.0.0.1').pathname;
    if (request.method === 'POST') {
      if (path === '/claim') return void response.end(encode({ ok: true, value: session }));
      if (request.headers[SESSION_HEADER] !== session) return void response.writeHead(403).end();
      if (path === '/stay') return void response.write(' ');
      const ask = decode(await bodyOf(request));
      const reply = await dispatch(contract, files.handlers, path.slice('/host/'.length), ask, (e) => failures.push(e));
      return void response.end(encode(reply));
    }
    const file = resolve(root, 'out/renderer', path === '/' ? 'index.html' : path.slice(1));
    const bytes = await readFile(file).catch(() => null);
    if (bytes === null) return void response.writeHead(404).end();
    response.writeHead(200, { ...PAGE_HEADERS, 'content-type': MIME[extname(file)] ?? 'application/octet-stream' });
    response.end(bytes);
  };
  const server = createServer((request, response) => void answer(request, response));
  await new Promise<void>((go) => server.listen(0, '127.0.0.1', go));
  const { port } = server.address() as AddressInfo;

  const browser: Browser = await chromium.launch({ executablePath: executable, args: ['--no-sandbox'] });
  const context = await browser.newContext({
    viewport: { width: 1280, height: 800 },
    locale: 'en-GB',
    colorScheme: dark ? 'dark' : 'light',
    acceptDownloads: true,
  });
  const page = await context.newPage();
  // Files go out as downloads, which a test can catch; the pickers of the browser need a person.
  await page.addInitScript(() => {
    Reflect.deleteProperty(window, 'showSaveFilePicker');
    Reflect.deleteProperty(window, 'showOpenFilePicker');
  });
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(error.message));
  page.on('console', (message) => {
    // Software drawing tells of its own slowness.
    if (/GPU stall|GL Driver|WebGL/.test(message.text())) return;
    if (message.type() === 'error' || message.type() === 'warning') complaints.push(message.text());
  });
  await page.goto(`http://127.0.0.1:${port}/#t=${randomUUID()}`);
  await page.locator('.open-desk').waitFor();
  return {
    page,
    scheme,
    complaints,
    close: async () => {
      await browser.close();
      server.closeAllConnections();
      await new Promise((go) => server.close(go));
      await rm(folder, { recursive: true, force: true });
      if (failures.length > 0) throw new AggregateError(failures, 'the host failed');
    },
  };
}
