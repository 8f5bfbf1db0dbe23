import { createCheckMemo } from '../../core/gain/gain-memo.ts';
import type { Fault } from '../../core/scheme/fault.ts';
import { schemeHash } from '../../core/scheme/hash.ts';
import { sizingSheet } from '../../core/sheet/sizing-sheet.ts';
import { ENGINE_VERSION } from '../../core/study/engine.ts';
import { writeCsv } from '../../core/sheet/csv.ts';
import { findingsTable } from '../../core/sheet/data-tables.ts';
import { findingsReport } from '../../core/sheet/findings-report.ts';
import { sensitivity } from '../../core/sizing/sensitivity.ts';
import { sweep } from '../../core/sizing/sweep.ts';
import { waysToPass } from '../../core/sizing/ways-to-pass.ts';
import { checkScheme } from '../../core/study/check.ts';
import { compareSchemes } from '../../core/study/compare-schemes.ts';
import { USUAL_TIMES, usualDates } from '../../core/study/sheet-document.ts';
import { reportJson } from '../../core/study/report-json.ts';
import { waysOfOver } from '../../core/study/ways-of-over.ts';
import { limitSetOf } from './limit-set.ts';
import type { Performers } from './performer.ts';
import { Years } from './years.ts';

/** Windows of which a worker remembers the days: an edit then works out that window again and nothing else. */
const REMEMBERED = 2000;

/** What is done for rooms: the check, why, and what can be done about it. Each worker has a memory of its own. */
export function roomTasks(): Pick<
  Performers,
  'check' | 'ways' | 'sensitivity' | 'sweep' | 'sizingSheet' | 'compare' | 'findingsFile' | 'report'
> {
  const memo = createCheckMemo(REMEMBERED);
  const years = new Years();
  return {
    check: ({ notes, weather }, held, pulse) => {
      const { scheme } = held();
      const year = weather === null ? null : years.of(scheme, weather);
      // A year that does not go with the site any more is told, and the design days are checked all the same.
      const told = year === null || year.ok ? [] : year.faults.map((fault): Fault => ({ ...fault, level: 'warning' }));
      return checkScheme(scheme, limitSetOf(scheme), [...notes, ...told], pulse, {
        memo,
        weather: year?.ok ? year.value : null,
      });
    },
    ways: async ({ limitSet, skyModel, weather, finding }, held) => {
      const under = { skyModel, weather: years.monthsOf(held().scheme, weather) };
      return waysToPass(held().scheme, limitSet, finding.room, finding, memo, under);
    },
    sensitivity: async ({ limitSet, skyModel, weather, finding }, held) => {
      const under = { skyModel, weather: years.monthsOf(held().scheme, weather) };
      return sensitivity(held().scheme, limitSet, finding.room, finding, memo, under);
    },
    sizingSheet: async ({ sweep: swept, target_Wh, drawn }, held) => {
      const { scheme } = held();
      const hash = schemeHash(scheme);
      return sizingSheet({ scheme, sweeps: [swept], target_Wh, paper: 'A3', drawn, engine: ENGINE_VERSION, hash });
    },
    sweep: async ({ windows, swept, target_Wh }, held) =>
      sweep(held().scheme, windows, swept, memo, target_Wh === null ? {} : { target_Wh }),
    compare: ({ variants, weather }, held, pulse) =>
      compareSchemes(
        variants.map((variant) => ({
          ...variant,
          limitSet: limitSetOf(variant.scheme),
          weather: years.inputOf(variant.scheme, weather),
        })),
        { dates: usualDates(held().scheme), times: USUAL_TIMES },
        memo,
        pulse,
      ),
    findingsFile: async ({ result, form }, held) =>
      form === 'csv'
        ? writeCsv(findingsTable(result))
        : `${JSON.stringify(reportJson(result, held().scheme, result.limitSet), null, 2)}\n`,
    report: async ({ result, drawn, weather }, held, pulse) => {
      const { scheme } = held();
      const ways = await waysOfOver(result, scheme, memo, pulse, years.monthsOf(scheme, weather));
      return ways === null ? null : { ok: true, value: findingsReport(result, scheme, { drawn, ways }), notes: [] };
    },
  };
}
