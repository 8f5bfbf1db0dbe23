import { readdir } from 'node:fs/promises';
import { MAX_BYTES } from '../contract/host.ts';
import { readBounded } from './read-bounded.ts';
import { shipped } from './shipped.ts';

const SUFFIX = '.scheme.json';

export type Demo = { readonly key: string; readonly name: string };

async function titleOf(key: string): Promise<string> {
  try {
    const { title } = JSON.parse(new TextDecoder().decode(await demoBytes(key))) as { title?: unknown };
    return typeof title === 'string' && title !== '' ? title : key;
  } catch {
    return key;
  }
}

/** The bytes of a shipped example. @throws when its file cannot be read */
async function demoBytes(key: string): Promise<Uint8Array> {
  const read = await readBounded(shipped('assets', 'demo', `${key}${SUFFIX}`), MAX_BYTES);
  if (!read.ok) throw new Error(`example ${key}: ${read.fault.message}`);
  return read.bytes;
}

/** The examples that ship with the program, by file name; their names are the titles of the schemes. */
export async function listDemos(): Promise<readonly Demo[]> {
  const files = await readdir(shipped('assets', 'demo'));
  const keys = files.filter((file) => file.endsWith(SUFFIX)).map((file) => file.slice(0, -SUFFIX.length));
  return Promise.all(keys.sort().map(async (key) => ({ key, name: await titleOf(key) })));
}

/** One shipped example; null for a key that is none (only names that the folder itself lists are ever read). */
export async function readDemo(key: string): Promise<{ name: string; bytes: Uint8Array } | null> {
  const demo = (await listDemos()).find((known) => known.key === key);
  return demo ? { name: demo.name, bytes: await demoBytes(key) } : null;
}
