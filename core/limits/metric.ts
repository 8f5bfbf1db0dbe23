import type { MetricId, YearMetricId } from './metric-id.ts';

/** What may be measured and limited: its name as it stands in findings, its unit, and how it is reached. */
export type Metric = {
  readonly id: MetricId;
  readonly name: string;
  readonly unit: string;
  readonly method: string;
  /** Whether it looks at design days one by one. */
  readonly byDay: boolean;
};

const GAIN =
  'Solar heat through the glass, step by step: beam and circumsolar light times the sunlit share of the glass and g at the sun’s angle; light of dome, horizon and ground times what the window sees of each and the hemispherical g; g counts the heat that the panes take up and give off inward (secondary heat, EN 410) with the light that passes, as if it came in at once; less frame, less closed blinds. Light that walls of other buildings and the undersides of devices throw back is left out; the ground in front counts as sunlit';

export const METRICS: { readonly [M in MetricId]: Metric } = {
  'peak-gain': {
    id: 'peak-gain',
    name: 'peak solar gain per m² of floor',
    unit: 'W/m²',
    method: `${GAIN}. The highest step of the day, over the floor area.`,
    byDay: true,
  },
  'mean-gain': {
    id: 'mean-gain',
    name: 'mean solar gain per m² of floor',
    unit: 'W/m²',
    method: `${GAIN}. The mean over the clock hours named, over the floor area.`,
    byDay: true,
  },
  'day-gain': {
    id: 'day-gain',
    name: 'solar gain of the day per m² of floor',
    unit: 'Wh/m²',
    method: `${GAIN}. Summed over the day, over the floor area.`,
    byDay: true,
  },
  'season-gain': {
    id: 'season-gain',
    name: 'solar gain of the warm half-year per m² of floor, every day clear',
    unit: 'kWh/m²',
    method: `${GAIN}. The clear 21st of each of the six warm months times the days of the month, over the floor area: what a season without cloud would bring.`,
    byDay: false,
  },
  'year-gain': {
    id: 'year-gain',
    name: 'solar gain of the weather year per m² of floor',
    unit: 'kWh/m²',
    method: `${GAIN}. Summed over every row of the weather file, over the floor area.`,
    byDay: false,
  },
  'warm-gain': {
    id: 'warm-gain',
    name: 'solar gain of the warm half of the weather year per m² of floor',
    unit: 'kWh/m²',
    method: `${GAIN}. Summed over the rows of April to September (October to March south of the equator), over the floor area.`,
    byDay: false,
  },
  'year-peak': {
    id: 'year-peak',
    name: 'highest solar gain of the weather year per m² of floor',
    unit: 'W/m²',
    method: `${GAIN}. The highest row of the weather file, a mean over its interval, over the floor area.`,
    byDay: false,
  },
  'hours-above': {
    id: 'hours-above',
    name: 'hours of the weather year with more solar gain than a threshold',
    unit: 'h',
    method: `${GAIN}. The rows of the weather file in which the gain over the floor area is above the threshold, times their length.`,
    byDay: false,
  },
  'glazing-to-floor': {
    id: 'glazing-to-floor',
    name: 'window openings as a share of the floor',
    unit: '%',
    method: 'The openings of the room’s windows, frames included, over its floor area.',
    byDay: false,
  },
};

export const METRIC_IDS = Object.keys(METRICS) as readonly MetricId[];

/** Whether a text names a metric. */
export const isMetric = (id: string): id is MetricId => Object.hasOwn(METRICS, id);

const YEAR_METRICS: readonly MetricId[] = [
  'year-gain',
  'warm-gain',
  'year-peak',
  'hours-above',
] satisfies YearMetricId[];

/** Whether a metric can only be read with a year of weather. */
export const needsWeather = (id: MetricId): id is YearMetricId => YEAR_METRICS.includes(id);
