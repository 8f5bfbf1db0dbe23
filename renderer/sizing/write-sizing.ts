import type { Scheme } from '../../core/scheme/schema.ts';
import type { Sweep } from '../../core/sizing/sweep.ts';
import { host } from '../bridge/host.ts';
import { hands } from '../jobs/hands.ts';
import { today } from '../sheets/today.ts';
import { stem } from '../sheets/write-sheets.ts';
import { tell } from '../state/messages.ts';
import { words } from '../words/words.ts';
import { target_kWh } from './sizing-state.ts';

/** The curves that are shown as a sheet, written where the user says. */
export async function writeSizing(sweep: Sweep, scheme: Scheme): Promise<void> {
  const failed = (why: string): void => tell('failure', words.sheets.failed(words.sizing.label, why));
  const target = target_kWh.peek();
  const ask = { sweep, target_Wh: target === null ? null : target * 1000, drawn: today() };
  const outcome = await hands.clerk.run('sizingSheet', ask, scheme);
  if (outcome.kind === 'failed') return failed(outcome.message);
  if (outcome.kind !== 'done') return;
  const pdf = await host['sheet:pdf']({ document: outcome.result });
  if (!pdf.ok) return failed(pdf.message);
  const name = `${stem()} ${words.sizing.fileName(sweep.windows)}`.slice(0, 110);
  const written = await host['export:write']({ name: `${name}.pdf`, bytes: pdf.value.bytes });
  if (!written.ok) failed(written.message);
  else if (written.value !== null) tell('news', words.sheets.written(written.value.name));
}
