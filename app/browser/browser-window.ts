import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** A profile of its own, empty each time: the user's extensions, sign-ins and history have no business in the desk. */
const SWITCHES = [
  '--no-first-run',
  '--no-default-browser-check',
  '--disable-sync',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-extensions',
  '--disable-features=Translate',
  // Without a graphics card WebGL is drawn in software, which browsers refuse to pages of strangers; this page is our own.
  '--enable-unsafe-swiftshader',
];

/** The switches of a browser that shows one address in a window of its own, without tabs or an address line. */
export function windowSwitches(address: string, profile: string, isRoot: boolean): string[] {
  // A browser's own sandbox does not start for root, in containers mostly; the page is ours alone either way.
  return [
    `--app=${address}`,
    `--user-data-dir=${profile}`,
    '--window-size=1360,880',
    ...SWITCHES,
    ...(isRoot ? ['--no-sandbox'] : []),
  ];
}

/** Whether windows can be shown here at all: on Linux a session says so by its display. */
export const hasDisplay = ({ platform, env }: { platform: NodeJS.Platform; env: NodeJS.ProcessEnv }): boolean =>
  platform !== 'linux' || Boolean(env.DISPLAY) || Boolean(env.WAYLAND_DISPLAY);

export type BrowserWindow = {
  /** Settles when the browser has ended, with whether it ended well. */
  readonly ended: Promise<boolean>;
  readonly close: () => Promise<void>;
};

/** Opens a browser's window on an address, in a profile that is thrown away after. */
export async function openBrowserWindow(browser: string, address: string): Promise<BrowserWindow> {
  const profile = await mkdtemp(join(tmpdir(), 'shadewright-window-'));
  const isRoot = process.getuid?.() === 0;
  const child: ChildProcess = spawn(browser, windowSwitches(address, profile, isRoot), { stdio: 'ignore' });
  const ended = new Promise<boolean>((settle) => {
    child.once('error', () => settle(false));
    // A signal leaves no code: someone closed it, which is an end like any other.
    child.once('exit', (code) => settle(code === null || code === 0));
  });
  return {
    ended,
    close: async () => {
      child.kill();
      await Promise.race([ended, new Promise((late) => setTimeout(late, 3000).unref())]);
      await rm(profile, { recursive: true, force: true, maxRetries: 5 }).catch(() => undefined);
    },
  };
}
