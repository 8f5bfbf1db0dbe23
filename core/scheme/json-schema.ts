import * as z from 'zod';
import { Scheme } from './schema.ts';

/** The scheme file as JSON Schema (draft 2020-12), as it is written by hand: fields with a default may be left out. */
export function schemeJsonSchema(): Record<string, unknown> {
  const schema = z.toJSONSchema(Scheme, { io: 'input', unrepresentable: 'any' }) as Record<string, unknown>;
  sizeOrShare(schema);
  return {
    ...schema,
    $id: 'shadewright-scheme-1',
    title: 'Shadewright scheme, version 1',
    description:
      'A site with its blocks, rooms, windows, devices and limits. Metres and degrees; x east, y north of the drawing, z up.',
  };
}

/** A window has a width or a share of its wall; reading turns the one into the other before the schema in zod sees it. */
function sizeOrShare(schema: Record<string, unknown>): void {
  const { windows } = schema['properties'] as { windows: { items: { required: string[]; oneOf?: unknown } } };
  windows.items.required = windows.items.required.filter((field) => field !== 'width');
  windows.items.oneOf = [{ required: ['width'] }, { required: ['share'] }];
}
