import { chmodSync, existsSync, mkdirSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { resolve } from 'node:path';
import preact from '@preact/preset-vite';
import { defineConfig } from 'electron-vite';
import type { Plugin } from 'vite';

const at = (path: string) => resolve(import.meta.dirname, path);

/** Bundled into the command and the main process, so that a cold start reads one file and not a tree of packages. */
const bundled = ['zod', 'commander', 'temporal-polyfill', 'clipper2-ts', 'three', 'three-mesh-bvh', '@noble/hashes'];

/**
 * Makes the built command one that can be run, and links it where npx looks. package.json has no `bin` on purpose: for a command
 * of the project itself npx would first link the project into its cache and run the whole build again, and npm never links it.
 */
function runnable(): Plugin {
  return {
    name: 'runnable-command',
    closeBundle() {
      const command = at('out/main/cli.js');
      const folder = at('node_modules/.bin');
      if (!existsSync(command)) return;
      chmodSync(command, 0o755);
      mkdirSync(folder, { recursive: true });
      const link = resolve(folder, 'shadewright');
      if (process.platform === 'win32') {
        writeFileSync(`${link}.cmd`, '@node "%~dp0\\..\\..\\out\\main\\cli.js" %*\r\n');
        return;
      }
      rmSync(link, { force: true });
      symlinkSync('../../out/main/cli.js', link);
    },
  };
}

export default defineConfig({
  main: {
    publicDir: false,
    plugins: [runnable()],
    build: {
      outDir: 'out/main',
      externalizeDeps: { exclude: bundled },
      rolldownOptions: {
        input: {
          main: at('app/desktop/main.ts'),
          cli: at('app/terminal/cli.ts'),
          'tile-worker': at('app/terminal/tile-worker.ts'),
        },
      },
    },
  },
  preload: {
    publicDir: false,
    build: {
      outDir: 'out/preload',
      externalizeDeps: false,
      rolldownOptions: {
        input: { preload: at('app/desktop/preload.ts') },
        output: { format: 'cjs', entryFileNames: '[name].cjs' },
      },
    },
  },
  renderer: {
    root: at('renderer'),
    publicDir: false,
    plugins: [preact()],
    worker: { format: 'es' },
    build: {
      outDir: at('out/renderer'),
      minify: true,
      // Read from the disk, not over a network: one large file costs nothing.
      chunkSizeWarningLimit: 4000,
      rolldownOptions: { input: { index: at('renderer/index.html') } },
    },
  },
});
