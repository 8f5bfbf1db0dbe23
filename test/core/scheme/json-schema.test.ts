import { resolve } from 'node:path';
import { expect, test } from 'vitest';
import { schemeJsonSchema } from '../../../core/scheme/json-schema.ts';

test('the published schema in assets/schema is the one the program checks with', async () => {
  const file = resolve(import.meta.dirname, '../../../assets/schema/scheme.schema.json');
  await expect(`${JSON.stringify(schemeJsonSchema(), null, 2)}\n`).toMatchFileSnapshot(file);
  const schema = schemeJsonSchema();
  expect(schema.required).toEqual(expect.arrayContaining(['format', 'version', 'site']));
  expect(schema.required).not.toContain('rooms');
});
