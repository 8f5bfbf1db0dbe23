/** What a limit may be set on. Add a metric here, its words in metric.ts and its computation in reading.ts. */
export type MetricId = 'peak-gain' | 'mean-gain' | 'day-gain' | 'season-gain' | 'glazing-to-floor' | YearMetricId;

/** Those that need a year of weather. */
export type YearMetricId = 'year-gain' | 'warm-gain' | 'year-peak' | 'hours-above';
