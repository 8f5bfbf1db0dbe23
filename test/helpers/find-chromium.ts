import { spawnSync } from 'node:child_process';
import { findBrowser } from '../../app/browser/find-browser.ts';

export type Found = { readonly path: string } | { readonly path: null; readonly why: string };

const HOW =
  'install Chromium, Chrome or Edge (Debian and Ubuntu: apt-get install chromium), or set SHADEWRIGHT_BROWSER to the path of one';

/** Tries apt where this process may use it; true when it says that it installed the package. */
function installWithApt(): boolean {
  const isRoot = process.platform === 'linux' && process.getuid?.() === 0;
  if (!isRoot || spawnSync('apt-get', ['--version'], { stdio: 'ignore' }).status !== 0) return false;
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const run = (...args: string[]) =>
    spawnSync('apt-get', args, { env, stdio: ['ignore', 'ignore', 'inherit'], timeout: 400_000 }).status === 0;
  console.log('No Chromium-family browser here: installing chromium with apt-get.');
  return run('update', '-qq') && run('install', '-y', '-qq', '--no-install-recommends', 'chromium');
}

/** An installed browser of the Chromium family; installs one where it may; else says why there is none and how to get one. */
export function findChromium(): Found {
  const path = findBrowser() ?? (installWithApt() ? findBrowser() : null);
  return path === null ? { path, why: `no Chromium-family browser found; ${HOW}` } : { path };
}
