import { spawn } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { EXAMPLE_WORD } from '../desktop/start-file.ts';
import { electronRuntime } from '../desktop/electron-runtime.ts';
import { settingsFolder } from '../files/settings-folder.ts';
import { shipped } from '../files/shipped.ts';
import { type BrowserWindow, hasDisplay, openBrowserWindow } from './browser-window.ts';
import { findBrowser } from './find-browser.ts';
import { type BrowserHost, startBrowserHost } from './loopback-host.ts';

/** What the desk begins with: a file, an example by key, or neither. */
type Beginning = { readonly scheme?: string | undefined; readonly example?: string | undefined };

type Asked = Beginning & {
  /** Tells the user, a line at a time. */
  readonly say: (line: string) => void;
};

const NO_BROWSER =
  'Neither the Electron runtime nor a Chromium-family browser (Chromium, Chrome, Edge) was found here; SHADEWRIGHT_BROWSER may name one.';
const NO_DISPLAY = 'There is no display here to open a window on.';

/** The Electron desktop, until its window is closed; false when it ended with an error (a system library is missing, mostly). */
async function openElectron(runtime: string, { scheme, example }: Beginning): Promise<boolean> {
  const { ELECTRON_RUN_AS_NODE: _, ...env } = process.env;
  const isRoot = process.platform === 'linux' && process.getuid?.() === 0;
  const words = [shipped(), ...(isRoot ? ['--no-sandbox'] : [])];
  if (example !== undefined) words.push(`${EXAMPLE_WORD}${example}`);
  if (scheme !== undefined) words.push(resolve(scheme));
  const child = spawn(runtime, words, { env, stdio: 'inherit' });
  return new Promise<boolean>((settle) => {
    child.once('error', () => settle(false));
    // A signal leaves no code: someone ended it, which is an end like any other.
    child.once('exit', (code) => settle(code === null || code === 0));
  });
}

/** Settles when the user interrupts the program. */
const interrupted = (): Promise<void> =>
  new Promise((settle) => {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.once(signal, () => settle());
  });

/** Serves until interrupted. A window that is closed can be opened again at a new address. */
class Serving {
  #host: BrowserHost;
  #say: (line: string) => void;

  constructor(host: BrowserHost, say: (line: string) => void) {
    this.#host = host;
    this.#say = say;
  }

  async keep(why: string): Promise<void> {
    this.#say(why);
    // A new one each time: a window that failed may have used the last.
    this.#say(`Open this address in a browser on this machine; it works once:\n  ${this.#host.newAddress()}`);
    this.#say('Serving until Ctrl+C.');
    await interrupted();
  }

  again(): void {
    this.#say(`The window was closed. To go on, open:\n  ${this.#host.newAddress()}`);
  }
}

/** The desk in a browser's window until either is closed; false when the browser ended with an error. */
async function showWindow(browser: string, host: BrowserHost, windowClosed: Promise<void>): Promise<boolean> {
  const window: BrowserWindow = await openBrowserWindow(browser, host.url);
  try {
    return await Promise.race([window.ended, windowClosed.then(() => true), interrupted().then(() => true)]);
  } finally {
    await window.close();
  }
}

/** Serves the desk on the loopback address and shows it in an installed browser, or prints the address where that cannot be. */
async function openInBrowser(
  { scheme, example }: Beginning,
  isShown: boolean,
  say: (line: string) => void,
): Promise<void> {
  const { version } = JSON.parse(readFileSync(shipped('package.json'), 'utf8')) as { version: string };
  let closed: () => void = () => undefined;
  const windowClosed = new Promise<void>((settle) => {
    closed = settle;
  });
  const host: BrowserHost = await startBrowserHost({
    port: 0,
    scheme: scheme === undefined ? undefined : resolve(scheme),
    example,
    dataDir: settingsFolder(),
    version,
    onWindowClosed: () => closed(),
    report: (error) => say(error instanceof Error ? (error.stack ?? error.message) : String(error)),
  });
  const serving = new Serving(host, say);
  try {
    const browser = findBrowser();
    let why = isShown ? NO_BROWSER : NO_DISPLAY;
    if (browser !== null && isShown) {
      say(`Opening the desk in a window of ${browser}.`);
      if (await showWindow(browser, host, windowClosed)) return;
      why = `${browser} ended with an error.`;
    }
    closed = () => serving.again();
    await serving.keep(why);
  } finally {
    await host.close();
  }
}

/**
 * Opens the desk and waits until it is closed: in Electron where its runtime is there and starts, else in a window of an installed
 * browser, else at an address that it prints. Says which of them it did.
 */
export async function openDesk({ say, ...beginning }: Asked): Promise<void> {
  const isShown = hasDisplay(process);
  const runtime = electronRuntime(shipped());
  if (runtime !== null && isShown) {
    say('Opening the desk in Electron.');
    if (await openElectron(runtime, beginning)) return;
    say('Electron ended with an error; what was not saved waits to be recovered.');
  } else if (runtime === null) say('The Electron runtime is not here.');
  await openInBrowser(beginning, isShown, say);
}
