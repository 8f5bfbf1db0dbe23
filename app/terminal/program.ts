import { readFileSync } from 'node:fs';
import { Command, CommanderError } from 'commander';
import { shipped } from '../files/shipped.ts';
import { declareCheck } from './check.ts';
import { declareCompare } from './compare.ts';
import type { Declare } from './declare.ts';
import { declareExposure } from './exposure.ts';
import { declareOpen } from './open.ts';
import { declareSchema } from './schema.ts';
import { declareShadows } from './shadows.ts';
import { declareSheet } from './sheet.ts';
import { declareSize } from './size.ts';
import { declareSun } from './sun.ts';
import { declareVerify } from './verify.ts';
import { EXIT, Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';

const STATUS_HELP = `
Exit status:
  0  done, and nothing is over a limit
  1  done, and something is over a limit, or a report does not hold
  2  the input or the call is wrong; nothing was written
  3  a fault of the program`;

const DECLARED: readonly Declare[] = [
  declareCheck,
  declareShadows,
  declareSheet,
  declareExposure,
  declareSun,
  declareSize,
  declareCompare,
  declareVerify,
  declareSchema,
  declareOpen,
];

/** The version that package.json states. */
export const version = (): string =>
  (JSON.parse(readFileSync(shipped('package.json'), 'utf8')) as { version: string }).version;

function build(screen: Screen, end: (status: number) => void): Command {
  const program = new Command('shadewright')
    .description('Shadows, sun and summer heat of a building scheme, from the terminal.')
    .version(version(), '-V, --version', 'print the version')
    .helpOption('-h, --help', 'print help')
    .helpCommand('help [command]', 'print the help of a command')
    .showSuggestionAfterError(true)
    .exitOverride()
    .configureOutput({ writeOut: screen.out, writeErr: screen.note, outputError: () => undefined })
    .addHelpText('after', STATUS_HELP);
  for (const declare of DECLARED) declare(program, screen, end);
  return program;
}

/** A complaint of the option parser as one sentence that says where help stands. */
function callLine(error: CommanderError, command: string): string {
  const said = error.message
    .replace(/^error: /, '')
    .replace(/\s*\n\s*/g, ' ')
    .replace(/\.$/, '');
  return `shadewright${command === '' ? '' : ` ${command}`}: ${said}; see shadewright ${command === '' ? '' : `${command} `}--help.`;
}

/** A fault of ours: short for a user, whole for whoever asks with SHADEWRIGHT_DEBUG=1. */
export function faultText(error: unknown): string {
  const said = error instanceof Error ? error.message : String(error);
  const stack = process.env.SHADEWRIGHT_DEBUG === '1' && error instanceof Error ? `${error.stack}\n` : '';
  return `shadewright: a fault of the program, not of your input: ${said.split('\n')[0]}. Please report it; SHADEWRIGHT_DEBUG=1 shows more.\n${stack}`;
}

/**
 * Runs one call of the command.
 * @param words what stands after `shadewright`
 * @returns the exit status
 */
export async function runCommand(words: readonly string[], screen: Screen): Promise<number> {
  let status: number = EXIT.within;
  const program = build(screen, (ended) => {
    status = ended;
  });
  const named = program.commands.find((command) => command.name() === words[0])?.name() ?? '';
  try {
    await program.parseAsync(words, { from: 'user' });
    return status;
  } catch (error) {
    if (error instanceof CommanderError) {
      if (error.exitCode === 0) return EXIT.within;
      if (error.code !== 'commander.help') screen.note(`${callLine(error, named)}\n`);
      return EXIT.refused;
    }
    if (error instanceof Refusal) {
      for (const line of error.lines) screen.note(`${line}\n`);
      return EXIT.refused;
    }
    screen.note(faultText(error));
    return EXIT.fault;
  }
}
