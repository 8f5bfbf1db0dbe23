import { createCheckMemo } from '../../core/gain/gain-memo.ts';
import { writeCsv } from '../../core/sheet/csv.ts';
import { findingsTable } from '../../core/sheet/data-tables.ts';
import { findingsReport } from '../../core/sheet/findings-report.ts';
import { sensitivity } from '../../core/sizing/sensitivity.ts';
import { sweep } from '../../core/sizing/sweep.ts';
import { waysToPass } from '../../core/sizing/ways-to-pass.ts';
import { checkScheme } from '../../core/study/check.ts';
import { reportJson } from '../../core/study/report-json.ts';
import { waysOfOver } from '../../core/study/ways-of-over.ts';
import { limitSetOf } from './limit-set.ts';
import type { Performers } from './performer.ts';

/** Windows of which a worker remembers the days: an edit then works out that window again and nothing else. */
const REMEMBERED = 2000;

/** What is done for rooms: the check, why, and what can be done about it. Each worker has a memory of its own. */
export function roomTasks(): Pick<Performers, 'check' | 'ways' | 'sensitivity' | 'sweep' | 'findingsFile' | 'report'> {
  const memo = createCheckMemo(REMEMBERED);
  return {
    check: ({ notes }, held, pulse) => {
      const { scheme } = held();
      return checkScheme(scheme, limitSetOf(scheme), notes, pulse, { memo });
    },
    ways: async ({ limitSet, skyModel, finding }, held) =>
      waysToPass(held().scheme, limitSet, finding.room, finding, memo, skyModel),
    sensitivity: async ({ limitSet, skyModel, finding }, held) =>
      sensitivity(held().scheme, limitSet, finding.room, finding, memo, skyModel),
    sweep: async ({ window, swept, target_Wh }, held) =>
      sweep(held().scheme, window, swept, memo, target_Wh === null ? {} : { target_Wh }),
    findingsFile: async ({ result, form }, held) =>
      form === 'csv'
        ? writeCsv(findingsTable(result))
        : `${JSON.stringify(reportJson(result, held().scheme, result.limitSet), null, 2)}\n`,
    report: async ({ result, drawn }, held, pulse) => {
      const { scheme } = held();
      const ways = await waysOfOver(result, scheme, memo, pulse);
      return ways === null ? null : { ok: true, value: findingsReport(result, scheme, { drawn, ways }), notes: [] };
    },
  };
}
