#!/usr/bin/env node
import { EXIT } from './refusal.ts';
import { faultText, runCommand } from './program.ts';
import { standardScreen } from './screen.ts';

const screen = standardScreen();

for (const stray of ['uncaughtException', 'unhandledRejection'] as const) {
  process.on(stray, (error: unknown) => {
    screen.note(faultText(error));
    process.exit(EXIT.fault);
  });
}

// Not process.exit: what was written must reach a slow pipe first.
process.exitCode = await runCommand(process.argv.slice(2), screen);
