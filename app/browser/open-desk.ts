import { spawn } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { electronRuntime } from '../desktop/electron-runtime.ts';
import { settingsFolder } from '../files/settings-folder.ts';
import { shipped } from '../files/shipped.ts';
import { type BrowserWindow, hasDisplay, openBrowserWindow } from './browser-window.ts';
import { findBrowser } from './find-browser.ts';
import { type BrowserHost, startBrowserHost } from './loopback-host.ts';

type Asked = {
  readonly scheme?: string;
  /** Tells the user, a line at a time. */
  readonly say: (line: string) => void;
};

const NO_BROWSER =
  'Neither the Electron runtime nor a Chromium-family browser (Chromium, Chrome, Edge) was found here; SHADEWRIGHT_BROWSER may name one.';
const NO_DISPLAY = 'There is no display here to open a window on.';

/** The Electron desktop, until its window is closed. */
async function openElectron(runtime: string, scheme: string | undefined): Promise<void> {
  const { ELECTRON_RUN_AS_NODE: _, ...env } = process.env;
  const isRoot = process.platform === 'linux' && process.getuid?.() === 0;
  const words = [shipped(), ...(isRoot ? ['--no-sandbox'] : []), ...(scheme === undefined ? [] : [resolve(scheme)])];
  const child = spawn(runtime, words, { env, stdio: 'inherit' });
  await new Promise<void>((done, failed) => {
    child.once('error', failed);
    child.once('exit', () => done());
  });
}

/** Settles when the user interrupts the program. */
const interrupted = (): Promise<void> =>
  new Promise((settle) => {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.once(signal, () => settle());
  });

/** Serves until interrupted; a window that was closed can be opened again at a new address. */
async function keepServing(host: BrowserHost, why: string, say: (line: string) => void): Promise<void> {
  say(why);
  say(`Open this address in a browser on this machine; it works once:\n  ${host.url}`);
  say('Serving until Ctrl+C.');
  await interrupted();
}

async function openInBrowser(
  browser: string,
  host: BrowserHost,
  windowClosed: Promise<void>,
  say: (line: string) => void,
): Promise<void> {
  say(`The Electron runtime is not here: opening the desk in a window of ${browser}.`);
  const window: BrowserWindow = await openBrowserWindow(browser, host.url);
  const stopped = interrupted();
  try {
    const endedWell = await Promise.race([window.ended, windowClosed.then(() => true), stopped.then(() => true)]);
    if (!endedWell) await keepServing(host, `${browser} did not open a window.`, say);
  } finally {
    await window.close();
  }
}

/**
 * Opens the desk and waits until it is closed: in Electron where its runtime is there, else in a window of an installed browser,
 * else at an address that it prints. Says which of them it did.
 */
export async function openDesk({ scheme, say }: Asked): Promise<void> {
  const isShown = hasDisplay(process);
  const runtime = electronRuntime(shipped());
  if (runtime !== null && isShown) {
    say('Opening the desk in Electron.');
    return openElectron(runtime, scheme);
  }
  const { version } = JSON.parse(readFileSync(shipped('package.json'), 'utf8')) as { version: string };
  const browser = findBrowser();
  let closed: () => void = () => undefined;
  const windowClosed = new Promise<void>((settle) => {
    closed = settle;
  });
  const isOwnWindow = browser !== null && isShown;
  const onWindowClosed = () => {
    if (isOwnWindow) closed();
    else say(`The window was closed. To go on, open:\n  ${host.newAddress()}`);
  };
  const report = (error: unknown) => say(error instanceof Error ? (error.stack ?? error.message) : String(error));
  const host: BrowserHost = await startBrowserHost({
    port: 0,
    scheme: scheme === undefined ? undefined : resolve(scheme),
    dataDir: settingsFolder(),
    version,
    onWindowClosed,
    report,
  });
  try {
    if (isOwnWindow) await openInBrowser(browser, host, windowClosed, say);
    else await keepServing(host, isShown ? NO_BROWSER : NO_DISPLAY, say);
  } finally {
    await host.close();
  }
}
