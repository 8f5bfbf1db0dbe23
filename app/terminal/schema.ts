import type { Declare } from './declare.ts';

const HELP = `
Examples:
  shadewright schema > scheme.schema.json     for an editor that checks JSON while you type`;

/** `shadewright schema`: the scheme file as JSON Schema. */
export const declareSchema: Declare = (program, screen) => {
  program
    .command('schema')
    .description('print the JSON Schema of the scheme file')
    .addHelpText('after', HELP)
    .action(async () => {
      const { schemeJsonSchema } = await import('../../core/scheme/json-schema.ts');
      screen.out(`${JSON.stringify(schemeJsonSchema(), null, 2)}\n`);
    });
};
