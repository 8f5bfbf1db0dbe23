import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

/** The program inside an unpacked runtime, where its installer has not said. */
const PROGRAM: { readonly [platform: string]: string } = {
  win32: 'electron.exe',
  darwin: 'Electron.app/Contents/MacOS/Electron',
};

/**
 * The Electron runtime beside this project; null: not there. Found by what its installer leaves behind, because requiring the
 * package would start a download.
 * @param root the project's folder
 */
export function electronRuntime(root: string, env: NodeJS.ProcessEnv = process.env): string | null {
  const home = join(root, 'node_modules', 'electron');
  const named = (() => {
    try {
      return readFileSync(join(home, 'path.txt'), 'utf8').trim();
    } catch {
      return '';
    }
  })();
  const folder = env.ELECTRON_OVERRIDE_DIST_PATH || (named === '' ? null : join(home, 'dist'));
  if (folder === null) return null;
  const path = join(folder, named === '' ? (PROGRAM[process.platform] ?? 'electron') : named);
  return existsSync(path) ? path : null;
}
