import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { limitsOfScheme } from '../../../app/files/shipped-limits.ts';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import { applyEdit, type SchemeEdit } from '../../../core/scheme/edit.ts';
import { writeScheme } from '../../../core/scheme/write.ts';
import { waysToPass } from '../../../core/sizing/ways-to-pass.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { demoScheme } from '../../helpers/demo-scheme.ts';
import { less } from '../../helpers/less-of.ts';
import { runCommand } from '../../helpers/run-command.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

type Report = { findings: { room: string; limit: string; verdict: string; value: number }[] };

describe('a way to pass, made and checked again from a saved file by the command', () => {
  const scheme = demoScheme('tannery-yard');
  const limits = limitsOfScheme(scheme);
  if (!limits.ok || limits.value === null) throw new Error('the demo has limits');
  const set = limits.value;
  const rechecked = async (edit: SchemeEdit, room: string, limit: string): Promise<string | undefined> => {
    const next = applyEdit(scheme, edit);
    if (!next.ok) throw new Error(JSON.stringify(next.faults));
    const folder = tempFolder();
    writeFileSync(join(folder, 'then.scheme.json'), writeScheme(next.value));
    const ran = await runCommand(['check', 'then.scheme.json', '--json'], folder);
    return (JSON.parse(ran.out) as Report).findings.find((f) => f.room === room && f.limit === limit)?.verdict;
  };

  test.each(['1.3', '0.6', '2.4'])('brings room %s within; one per cent less of it leaves it over', async (room) => {
    const result = await checkScheme(scheme, set, [], async () => 'go');
    const finding = result?.findings.find((f) => f.room === room && f.verdict === 'over');
    if (finding === undefined) throw new Error(`room ${room} is over`);
    const { ways } = waysToPass(scheme, set, room, finding, createCheckMemo());
    const depths = ways.filter((way) => way.passes && (way.lever === 'overhang' || way.lever === 'fins'));
    const glass = ways.filter((way) => way.passes && way.lever === 'glass');
    expect(depths.length + glass.length).toBeGreaterThan(0);
    for (const way of [...depths, ...glass]) {
      if (!way.passes) continue;
      expect(await rechecked(way.edit, room, finding.limit), way.text).not.toBe('over');
      // Less of it: a shallower device, or glass that lets more in.
      expect(await rechecked(less(way), room, finding.limit), `less than ${way.text}`).toBe('over');
    }
  });
});
