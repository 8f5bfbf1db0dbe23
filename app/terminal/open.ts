import type { Declare } from './declare.ts';
import { Refusal } from './refusal.ts';
import { readScheme } from './read-input.ts';

const HELP = `
Examples:
  shadewright open
  shadewright open scheme.json
  shadewright open --example tannery-yard`;

/** @throws {Refusal} naming the examples there are */
async function findExample(key: string): Promise<void> {
  const { listDemos } = await import('../files/demos.ts');
  const keys = (await listDemos()).map((demo) => demo.key);
  if (!keys.includes(key)) throw new Refusal(`--example: there is no example “${key}”; there are ${keys.join(', ')}.`);
}

/** `shadewright open`: the desk, in Electron where its runtime is there, else in an installed browser. */
export const declareOpen: Declare = (program, screen) => {
  program
    .command('open')
    .description('open the desk')
    .argument('[SCHEME]', 'the scheme to open with; without one, the desk offers recent ones and examples')
    .option('--example <KEY>', 'begin with a copy of a shipped example, which cannot be saved over')
    .addHelpText('after', HELP)
    .action(async (path: string | undefined, { example }: { example?: string }) => {
      if (path !== undefined && example !== undefined)
        throw new Refusal('open takes a scheme or --example, not both: leave one out.');
      if (example !== undefined) await findExample(example);
      // A broken file is told here, where its faults can be read, and not in a window.
      if (path !== undefined) await readScheme(path, screen);
      const { openDesk } = await import('../browser/open-desk.ts');
      await openDesk({ scheme: path, example, say: (line) => screen.out(`${line}\n`) });
    });
};
