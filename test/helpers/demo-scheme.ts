import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { buildModel } from '../../core/form/build-model.ts';
import type { Model } from '../../core/form/model.ts';
import { Scheme } from '../../core/scheme/schema.ts';

/** One of the shipped example schemes. */
export const demoScheme = (key: string): Scheme =>
  Scheme.parse(JSON.parse(readFileSync(join(import.meta.dirname, `../../assets/demo/${key}.scheme.json`), 'utf8')));

/** A scheme as shapes; a fault in a test scheme is a fault of the test. */
export const modelOf = (scheme: Scheme): Model => buildModel(scheme);
