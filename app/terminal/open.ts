import type { Declare } from './declare.ts';
import { readScheme } from './read-input.ts';

const HELP = `
Examples:
  shadewright open
  shadewright open scheme.json`;

/** `shadewright open`: the desk, in Electron where its runtime is there, else in an installed browser. */
export const declareOpen: Declare = (program, screen) => {
  program
    .command('open')
    .description('open the desk')
    .argument('[SCHEME]', 'the scheme to open with; without one, the desk offers recent ones and examples')
    .addHelpText('after', HELP)
    .action(async (path: string | undefined) => {
      // A broken file is told here, where its faults can be read, and not in a window.
      if (path !== undefined) await readScheme(path, screen);
      const { openDesk } = await import('../browser/open-desk.ts');
      await openDesk({ ...(path === undefined ? {} : { scheme: path }), say: (line) => screen.out(`${line}\n`) });
    });
};
