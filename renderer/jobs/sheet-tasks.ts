import { writeCsv } from '../../core/sheet/csv.ts';
import { shadowTable } from '../../core/sheet/data-tables.ts';
import { shadowGeoJson } from '../../core/sheet/geojson.ts';
import { shadowMoments } from '../../core/study/shadow-moments.ts';
import { sheetDocument, USUAL_TIMES, usualDates } from '../../core/study/sheet-document.ts';
import { limitSetOf } from './limit-set.ts';
import type { Performers } from './performer.ts';
import { Years } from './years.ts';

/** What is drawn on sheets, and the tables and shapes that go with them. */
export const sheetTasks = (years = new Years()): Pick<Performers, 'sheet' | 'shadowFile'> => ({
  sheet: ({ set, drawn, notes, weather }, held, pulse) => {
    const { scheme, model } = held();
    const year = years.inputOf(scheme, weather);
    return sheetDocument(scheme, model, set, { drawn, notes, limitSet: limitSetOf(scheme), weather: year }, pulse);
  },
  shadowFile: async ({ set, form }, held) => {
    const { scheme, model } = held();
    const dates = set.dates.length > 0 ? set.dates : usualDates(scheme);
    const times = set.times.length > 0 ? set.times : USUAL_TIMES;
    const moments = shadowMoments(scheme, model, dates, times);
    return form === 'csv'
      ? writeCsv(shadowTable(moments))
      : `${JSON.stringify(shadowGeoJson(scheme, model, moments))}\n`;
  },
});
