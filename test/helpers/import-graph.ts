import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve, sep } from 'node:path';

export type Import = {
  /** Path of the importing file from the root, with forward slashes. */
  readonly from: string;
  /** Path of the file imported, or the name of a package or of a Node module. */
  readonly to: string;
  readonly isLocal: boolean;
  readonly isTypeOnly: boolean;
};

const root = resolve(import.meta.dirname, '../..');
const slashed = (path: string): string => path.split(sep).join('/');

/** Every TypeScript file under a folder of the root. */
export function sourceFiles(folder: string): readonly string[] {
  return readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.tsx?$/.test(name) && !name.endsWith('.d.ts'))
    .map((name) => slashed(join(folder, name)));
}

/** `import … from`, `export … from`, `import '…'`, `import('…')` and `new URL('…', import.meta.url)`, comments left out. */
const FORMS = [
  /^[ \t]*(?:import|export)\s+(type\s+)?(?:[\w*{}\s,$]+?\s+from\s+)?['"]([^'"]+)['"]/gm,
  /\bimport\(\s*()['"]([^'"]+)['"]\s*\)/g,
  /\bnew URL\(\s*()['"](\.[^'"]+)['"]\s*,\s*import\.meta\.url/g,
];

/** What one file imports. @param file from the root */
export function importsOf(file: string): readonly Import[] {
  const text = readFileSync(join(root, file), 'utf8')
    .replace(/\/\*[\s\S]*?\*\//g, '')
    .replace(/^\s*\/\/.*$/gm, '');
  return FORMS.flatMap((form) =>
    [...text.matchAll(form)].map(([, type, named = '']) => {
      const isLocal = named.startsWith('.');
      const path = named.split('?')[0] ?? named;
      const to = isLocal ? slashed(relative(root, resolve(root, dirname(file), path))) : named;
      return { from: file, to, isLocal, isTypeOnly: Boolean(type) };
    }),
  );
}

/** One cycle of imports that a program would follow, as the files in its order; null: none. */
export function findCycle(edges: ReadonlyMap<string, readonly string[]>): readonly string[] | null {
  const state = new Map<string, 'open' | 'done'>();
  const trail: string[] = [];
  const visit = (file: string): readonly string[] | null => {
    if (state.get(file) === 'done') return null;
    if (state.get(file) === 'open') return [...trail.slice(trail.indexOf(file)), file];
    state.set(file, 'open');
    trail.push(file);
    for (const next of edges.get(file) ?? []) {
      const cycle = visit(next);
      if (cycle) return cycle;
    }
    trail.pop();
    state.set(file, 'done');
    return null;
  };
  for (const file of edges.keys()) {
    const cycle = visit(file);
    if (cycle) return cycle;
  }
  return null;
}
