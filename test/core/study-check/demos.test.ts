import { expect, it } from 'vitest';
import { checkScheme } from '../../../core/study/check.ts';
import { demoScheme } from '../../helpers/demo-scheme.ts';

const DEMOS = ['tannery-yard', 'jacaranda-clinic', 'two-hundred-blocks'];

it.each(DEMOS)('%s has nothing to be told about how it is drawn', async (name) => {
  const result = await checkScheme(demoScheme(name), null, [], async () => 'go');
  expect(result?.notes).toEqual([]);
});
