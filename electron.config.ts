import { resolve } from 'node:path';
import preact from '@preact/preset-vite';
import { defineConfig } from 'electron-vite';

const at = (path: string) => resolve(import.meta.dirname, path);

/** Bundled into the command and the main process, so that a cold start reads one file and not a tree of packages. */
const bundled = ['zod', 'commander', 'temporal-polyfill', 'clipper2-ts', 'three', 'three-mesh-bvh'];

export default defineConfig({
  main: {
    publicDir: false,
    build: {
      outDir: 'out/main',
      externalizeDeps: { exclude: bundled },
      rolldownOptions: { input: { main: at('app/desktop/main.ts'), cli: at('app/terminal/cli.ts') } },
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
      rolldownOptions: { input: { index: at('renderer/index.html') } },
    },
  },
});
