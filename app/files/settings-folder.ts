import { homedir } from 'node:os';
import { join } from 'node:path';

type System = { readonly platform: NodeJS.Platform; readonly env: NodeJS.ProcessEnv };

/**
 * Where recent files and unsaved work are kept, the same for every host of one user. `SHADEWRIGHT_DATA` puts it elsewhere.
 * @param home the user's own folder
 */
export function settingsFolder({ platform, env }: System = process, home: string = homedir()): string {
  if (env.SHADEWRIGHT_DATA) return env.SHADEWRIGHT_DATA;
  if (platform === 'darwin') return join(home, 'Library', 'Application Support', 'Shadewright');
  if (platform === 'win32') return join(env.APPDATA ?? join(home, 'AppData', 'Roaming'), 'Shadewright');
  return join(env.XDG_DATA_HOME || join(home, '.local', 'share'), 'shadewright');
}
