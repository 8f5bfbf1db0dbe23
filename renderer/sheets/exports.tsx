import { signal } from '@preact/signals';
import type { Checked } from '../../core/scheme/fault.ts';
import { faultLine } from '../../core/scheme/fault.ts';
import type { Document } from '../../core/sheet/drawing.ts';
import { host } from '../bridge/host.ts';
import { hands } from '../jobs/hands.ts';
import type { Outcome } from '../jobs/worker-hand.ts';
import { tell } from '../state/messages.ts';
import { check, isCheckStale } from '../state/studies.ts';
import { Menu } from '../ui/menu.tsx';
import { weatherOf } from '../state/weather-at-hand.ts';
import { words } from '../words/words.ts';
import { openSheets } from './sheet-state.ts';
import { today } from './today.ts';
import { stem } from './write-sheets.ts';

const isSetting = signal(false);

/** The sheets that can be printed from what is on the desk. */
export function Exports() {
  const canReport = check.value !== null && !isCheckStale.value;
  return (
    <Menu
      text={words.bar.print}
      off={isSetting.value}
      items={[
        { text: words.sheets.open, onPress: openSheets },
        {
          text: words.sheets.report,
          off: !canReport,
          tip: canReport ? undefined : words.sheets.needsCheck,
          onPress: () => void printReport(),
        },
        {
          text: words.sheets.findingsCsv,
          off: !canReport,
          tip: canReport ? undefined : words.sheets.needsCheck,
          onPress: () => void writeFindings('csv'),
        },
        {
          text: words.sheets.findingsJson,
          off: !canReport,
          tip: canReport ? undefined : words.sheets.needsCheck,
          onPress: () => void writeFindings('json'),
        },
      ]}
    />
  );
}

async function printReport(): Promise<void> {
  const found = check.peek();
  if (found === null) return;
  const ask = { result: found.value, drawn: today(), weather: weatherOf(found.value) };
  await print(words.sheets.report, `${stem()} findings.pdf`, hands.clerk.run('report', ask, found.scheme));
}

/** The findings as a table, or as the report that `shadewright verify` works out again. */
async function writeFindings(form: 'csv' | 'json'): Promise<void> {
  const found = check.peek();
  if (found === null) return;
  const what = form === 'csv' ? words.sheets.findingsCsv : words.sheets.findingsJson;
  const outcome = await hands.clerk.run('findingsFile', { result: found.value, form }, found.scheme);
  if (outcome.kind === 'failed') return tell('failure', words.sheets.failed(what, outcome.message));
  if (outcome.kind === 'stopped') return;
  const bytes = new TextEncoder().encode(outcome.result);
  const written = await host['export:write']({ name: `${stem()} findings.${form}`, bytes });
  if (!written.ok) return tell('failure', words.sheets.failed(what, written.message));
  if (written.value !== null) tell('news', words.sheets.written(written.value.name));
}

async function print(what: string, name: string, work: Promise<Outcome<Checked<Document>>>): Promise<void> {
  isSetting.value = true;
  tell('news', words.sheets.setting(what));
  const failure = await setAndWrite(name, work);
  isSetting.value = false;
  if (failure !== null) tell('failure', words.sheets.failed(what, failure));
}

/** @returns why it did not come to be, or null */
async function setAndWrite(name: string, work: Promise<Outcome<Checked<Document>>>): Promise<string | null> {
  const outcome = await work;
  if (outcome.kind === 'failed') return outcome.message;
  if (outcome.kind === 'stopped') return words.status.stopped;
  if (!outcome.result.ok) return outcome.result.faults.map(faultLine).join(' · ');
  const pdf = await host['sheet:pdf']({ document: outcome.result.value });
  if (!pdf.ok) return pdf.message;
  const written = await host['export:write']({ name, bytes: pdf.value.bytes });
  if (!written.ok) return written.message;
  if (written.value !== null) tell('news', words.sheets.written(written.value.name));
  return null;
}
