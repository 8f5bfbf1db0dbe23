import * as z from 'zod';
import { Scheme } from './schema.ts';

/** The scheme file as JSON Schema (draft 2020-12), as it is written by hand: fields with a default may be left out. */
export function schemeJsonSchema(): Record<string, unknown> {
  const schema = z.toJSONSchema(Scheme, { io: 'input', unrepresentable: 'any' }) as Record<string, unknown>;
  return {
    ...schema,
    $id: 'shadewright-scheme-1',
    title: 'Shadewright scheme, version 1',
    description:
      'A site with its blocks, rooms, windows, devices and limits. Metres and degrees; x east, y north of the drawing, z up.',
  };
}
