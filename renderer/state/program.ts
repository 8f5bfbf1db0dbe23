import { signal } from '@preact/signals';

/** The version of the program, as its host says; empty until it has. */
export const version = signal('');
