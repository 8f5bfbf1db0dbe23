import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, rmSync, statSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';

const root = resolve(import.meta.dirname, '../..');
const SOURCES = ['core', 'app', 'renderer', 'assets', 'electron.config.ts', 'package.json'];
const PRODUCTS = ['out/main/cli.js', 'out/main/main.js', 'out/preload/preload.cjs', 'out/renderer/index.html'];

function newest_ms(path: string): number {
  const { mtimeMs } = statSync(path);
  if (!statSync(path).isDirectory()) return mtimeMs;
  return readdirSync(path).reduce((latest, name) => Math.max(latest, newest_ms(join(path, name))), 0);
}

/** Whether a product is missing or older than the newest source. */
function isStale(): boolean {
  const products = PRODUCTS.map((p) => join(root, p));
  if (!products.every((p) => existsSync(p))) return true;
  const built_ms = Math.min(...products.map((p) => statSync(p).mtimeMs));
  return SOURCES.some((source) => newest_ms(join(root, source)) > built_ms);
}

/** Tests of the command and of the desk run the built program: builds it first when a source is newer. One build at a time. */
export default async function freshBuild(): Promise<void> {
  if (!isStale()) return;
  const lock = join(root, 'out/.building');
  mkdirSync(join(root, 'out'), { recursive: true });
  const deadline = Date.now() + 120_000;
  for (;;) {
    try {
      mkdirSync(lock);
      break;
    } catch {
      if (Date.now() > deadline) rmSync(lock, { recursive: true, force: true });
      await sleep(250);
    }
  }
  try {
    if (!isStale()) return;
    const run = spawnSync('npm', ['run', '--silent', 'build'], {
      cwd: root,
      encoding: 'utf8',
      shell: process.platform === 'win32',
    });
    if (run.status !== 0) throw new Error(`the program does not build:\n${run.stdout}\n${run.stderr}`);
  } finally {
    rmSync(lock, { recursive: true, force: true });
  }
}
