import { accessSync, constants, statSync } from 'node:fs';
import { delimiter, join } from 'node:path';

/** Names under which systems install a browser of the Chromium family, looked for along PATH. */
const NAMES = [
  'chromium',
  'chromium-browser',
  'google-chrome',
  'google-chrome-stable',
  'microsoft-edge',
  'microsoft-edge-stable',
  'brave-browser',
  'vivaldi',
];

const MAC = ['Google Chrome', 'Chromium', 'Microsoft Edge', 'Brave Browser', 'Vivaldi'].map(
  (name) => `/Applications/${name}.app/Contents/MacOS/${name}`,
);

const WINDOWS = [
  'Google/Chrome/Application/chrome.exe',
  'Chromium/Application/chrome.exe',
  'Microsoft/Edge/Application/msedge.exe',
  'BraveSoftware/Brave-Browser/Application/brave.exe',
];

type Places = { readonly platform: NodeJS.Platform; readonly env: NodeJS.ProcessEnv };

/** Every place where a browser may stand on this system, best first. `SHADEWRIGHT_BROWSER` goes before them all. */
export function browserPlaces({ platform, env }: Places): string[] {
  const chosen = env.SHADEWRIGHT_BROWSER ? [env.SHADEWRIGHT_BROWSER] : [];
  if (platform === 'darwin')
    return [...chosen, ...MAC, ...(env.HOME ? MAC.map((path) => join(env.HOME as string, path)) : [])];
  if (platform === 'win32') {
    const roots = [env.PROGRAMFILES, env['PROGRAMFILES(X86)'], env.LOCALAPPDATA].filter((root) => root !== undefined);
    return [...chosen, ...roots.flatMap((root) => WINDOWS.map((path) => join(root, path)))];
  }
  const folders = (env.PATH ?? '').split(delimiter).filter((folder) => folder !== '');
  return [...chosen, ...NAMES.flatMap((name) => folders.map((folder) => join(folder, name))), '/snap/bin/chromium'];
}

function isRunnable(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return statSync(path).isFile();
  } catch {
    return false;
  }
}

/** The installed browser of the Chromium family to show the desk in; null: none found. */
export function findBrowser(places: Places = process): string | null {
  return browserPlaces(places).find(isRunnable) ?? null;
}
