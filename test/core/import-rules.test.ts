import { existsSync, readdirSync } from 'node:fs';
import { builtinModules } from 'node:module';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { findCycle, type Import, importsOf, sourceFiles } from '../helpers/import-graph.ts';

const root = resolve(import.meta.dirname, '../..');

/** The stages of core, each of which imports only from itself and from those before it. */
const STAGES = [
  'units',
  'maths',
  'plane',
  'scheme',
  'sun',
  'sky',
  'form',
  'shade',
  'gain',
  'daylight',
  'heat',
  'limits',
  'sizing',
  'sheet',
  'study',
  'import',
];

/** Libraries that core may use, and the only folders that may. */
const LIBRARIES: { readonly [name: string]: string } = {
  zod: 'core/scheme/',
  'clipper2-ts': 'core/plane/',
  'temporal-polyfill': 'core/sun/',
  '@noble/hashes': 'core/scheme/',
  '@photostructure/tz-lookup': 'core/sun/',
  three: 'core/shade/mesh/',
  'three-mesh-bvh': 'core/shade/mesh/',
};

const files = ['core', 'app', 'renderer'].flatMap(sourceFiles);
const imports = files.flatMap(importsOf);
const from = (folder: string): readonly Import[] => imports.filter((i) => i.from.startsWith(`${folder}/`));
const partOf = (path: string, at: number): string => path.split('/')[at] ?? '';
const packageOf = (name: string): string =>
  name
    .split('/')
    .slice(0, name.startsWith('@') ? 2 : 1)
    .join('/');
const isNode = (name: string): boolean => name.startsWith('node:') || builtinModules.includes(packageOf(name));
const said = (broken: readonly Import[]): string[] => broken.map((i) => `${i.from} → ${i.to}`);

test('the walk finds the program (a reader that sees nothing would pass every rule below)', () => {
  expect(files.length).toBeGreaterThan(150);
  expect(imports.length).toBeGreaterThan(400);
  expect(said(imports)).toContain('app/terminal/cli.ts → app/terminal/program.ts');
  expect(
    said(imports.filter((i) => i.isLocal && !existsSync(resolve(root, i.to)))),
    'imports of files that are not there',
  ).toEqual([]);
});

describe('core', () => {
  test('has no stage that the order does not know', () => {
    const folders = readdirSync(resolve(root, 'core'), { withFileTypes: true })
      .filter((entry) => entry.isDirectory())
      .map((entry) => entry.name);
    expect(folders.filter((name) => !STAGES.includes(name))).toEqual([]);
  });

  test('imports only from earlier stages', () => {
    const broken = from('core').filter((i) => {
      if (!i.isLocal) return false;
      if (!i.to.startsWith('core/')) return true;
      return STAGES.indexOf(partOf(i.to, 1)) > STAGES.indexOf(partOf(i.from, 1));
    });
    expect(said(broken)).toEqual([]);
  });

  test('keeps each library to the stages that own it, and has no Node, no screen and no Electron', () => {
    const broken = from('core').filter(
      (i) => !i.isLocal && !i.from.startsWith(LIBRARIES[packageOf(i.to)] ?? 'nowhere'),
    );
    expect(said(broken)).toEqual([]);
  });
});

describe('app', () => {
  test('never imports the screens', () => {
    expect(said(from('app').filter((i) => i.to.startsWith('renderer/')))).toEqual([]);
  });

  test('keeps electron to the desktop, and zod to the contract', () => {
    const broken = from('app').filter(
      (i) =>
        (packageOf(i.to) === 'electron' && !i.from.startsWith('app/desktop/')) ||
        (packageOf(i.to) === 'zod' && !i.from.startsWith('app/contract/')),
    );
    expect(said(broken)).toEqual([]);
  });

  test('has a contract that needs neither Node nor any other part of app', () => {
    const broken = from('app/contract').filter(
      (i) => isNode(i.to) || (i.to.startsWith('app/') && !i.to.startsWith('app/contract/')),
    );
    expect(said(broken)).toEqual([]);
  });

  test('gives the preload names and types only: validators stay in main', () => {
    const values = importsOf('app/desktop/preload.ts')
      .filter((i) => !i.isTypeOnly)
      .map((i) => i.to);
    expect(values.sort()).toEqual(['app/contract/channels.ts', 'electron/renderer']);
    expect(importsOf('app/contract/channels.ts').every((i) => i.isTypeOnly)).toBe(true);
    expect(importsOf('app/contract/wire.ts')).toEqual([]);
  });
});

describe('the screens', () => {
  test('import core and the contract, never Node, Electron or what is privileged', () => {
    const broken = from('renderer').filter(
      (i) =>
        isNode(i.to) ||
        packageOf(i.to) === 'electron' ||
        (i.to.startsWith('app/') && !i.to.startsWith('app/contract/')),
    );
    expect(said(broken)).toEqual([]);
  });

  test('keep three.js to the massing', () => {
    const broken = from('renderer').filter((i) => /^three/.test(i.to) && !i.from.startsWith('renderer/massing/'));
    expect(said(broken)).toEqual([]);
  });
});

test('nothing imports itself round a corner', () => {
  const edges = new Map(
    files.map((file) => [
      file,
      importsOf(file)
        .filter((i) => i.isLocal && !i.isTypeOnly)
        .map((i) => i.to),
    ]),
  );
  expect(findCycle(edges)).toBeNull();
  expect(
    findCycle(
      new Map([
        ['a', ['b']],
        ['b', ['c']],
        ['c', ['b']],
      ]),
    ),
    'a cycle would be found',
  ).toEqual(['b', 'c', 'b']);
});
