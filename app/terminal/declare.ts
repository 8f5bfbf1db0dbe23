import type { Command } from 'commander';
import type { Screen } from './screen.ts';

/**
 * Adds one subcommand to the program: its words, options and help, and what it does. Heavy parts are imported inside what it
 * does, so that help and the other subcommands do not wait for them.
 * @param end takes the exit status; a subcommand that never calls it ends with 0, one that throws a `Refusal` with 2
 */
export type Declare = (program: Command, screen: Screen, end: (status: number) => void) => void;
