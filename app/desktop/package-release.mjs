/**
 * `npm run package`: makes the installers for this system. Checks the settings against electron-builder's own schema first, builds,
 * then packages; where the Electron runtime cannot be had, it says so plainly and fails.
 */
import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { resolve } from 'node:path';

const root = resolve(import.meta.dirname, '../..');
const require = createRequire(import.meta.url);
const config = JSON.parse(readFileSync(resolve(import.meta.dirname, 'electron-builder.json'), 'utf8'));

const end = (message) => {
  console.error(message);
  process.exit(1);
};

const run = (words, label) => {
  const { status } = spawnSync('npx', words, { cwd: root, stdio: 'inherit', shell: process.platform === 'win32' });
  if (status !== 0) end(`${label} failed.`);
};

const { validateConfiguration } = require('app-builder-lib/out/util/config/config');
try {
  await validateConfiguration(config, { isEnabled: false, add: () => undefined });
  console.log('The packaging settings agree with the schema of electron-builder.');
} catch (error) {
  end(`app/desktop/electron-builder.json does not agree with the schema of electron-builder:\n${error.message}`);
}
if (!existsSync(resolve(root, config.icon))) end(`${config.icon} is named in the packaging settings and is not there.`);
if (process.argv.includes('--check')) process.exit(0);

const provided = process.env.ELECTRON_OVERRIDE_DIST_PATH;
if (!provided) {
  const { status } = spawnSync('npx', ['--no', 'install-electron'], {
    cwd: root,
    stdio: 'ignore',
    timeout: 300_000,
    shell: process.platform === 'win32',
  });
  if (status !== 0)
    end(
      'No installer was made: the Electron runtime is not here and could not be fetched.\n' +
        'It comes from github.com/electron/electron/releases; run this where that can be reached, or set ELECTRON_OVERRIDE_DIST_PATH.',
    );
}
run(['electron-vite', 'build', '--config', 'electron.config.ts'], 'The build');
run(
  [
    'electron-builder',
    '--config',
    'app/desktop/electron-builder.json',
    '--publish',
    'never',
    ...(provided ? [`--config.electronDist=${provided}`] : []),
  ],
  'Packaging',
);
