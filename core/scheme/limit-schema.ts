import * as z from 'zod';

/**
 * A limit set as a file, version 1. The shape is checked here; whether its metrics, days and uses exist is checked in
 * core/limits, which knows them. Objects are loose: fields that this version does not know are kept.
 */
const text = z.string().max(4000);
const value = z.number().min(0).max(1e6);
const clock = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$|^24:00$/);

export const LimitEntry = z.looseObject({
  id: z.string().min(1).max(60),
  name: text.describe('what a person would call it'),
  metric: z.string().max(60).describe('what is measured, such as peak-gain'),
  comparison: z.enum(['at-most', 'at-least']).default('at-most'),
  value: value.describe('in the unit of the metric'),
  unit: z.string().max(20),
  byBearing: z
    .looseObject({ N: value, E: value, S: value, W: value })
    .optional()
    .describe('values by true bearing of the most glazed wall; they stand in place of `value`'),
  byGlazing: z
    .array(
      z.looseObject({
        upTo: z.number().min(0).max(1000).describe('openings as a share of the floor, up to this [%]'),
        value,
        byBearing: z.looseObject({ N: value, E: value, S: value, W: value }).optional(),
      }),
    )
    .min(1)
    .max(20)
    .optional()
    .describe('values by how much of the floor the openings are, smallest first; above all of them `value` holds'),
  uses: z.array(z.string().max(60)).max(20).optional().describe('uses of rooms it applies to; absent: every room'),
  days: z
    .array(z.string().max(60))
    .min(1)
    .max(20)
    .optional()
    .describe('design days it looks at; absent: the hottest design day'),
  clock: z.tuple([clock, clock]).optional().describe('stretch of the civil day, for means'),
  above: z.number().min(0).max(2000).optional().describe('threshold of hours-above [W per m² of floor]'),
  source: text.describe('where the value comes from'),
  checked: z
    .string()
    .regex(/^\d{4}-\d\d-\d\d$/)
    .nullable()
    .default(null)
    .describe('when someone last compared it with its source'),
});

export const LimitSetFile = z.looseObject({
  format: z.literal('shadewright-limits'),
  version: z.literal(1),
  id: z.string().min(1).max(60),
  name: text,
  example: z.boolean().default(false),
  note: text.default(''),
  close: z
    .number()
    .min(0)
    .max(0.5)
    .default(0.1)
    .describe('band next to a limit that counts as close, as a share of it'),
  limits: z.array(LimitEntry).min(1).max(200),
});
export type LimitSetFile = z.output<typeof LimitSetFile>;
