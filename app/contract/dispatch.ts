import type * as z from 'zod';
import type { contract, Reply } from './host.ts';

type Table = { readonly [channel: string]: { readonly ask: z.ZodType; readonly reply: z.ZodType } };

/** What a host does for each channel of a table; a handler throws `HostFault` for what the user should read. */
export type HandlersOf<T extends Table> = {
  readonly [C in keyof T]: (ask: z.output<T[C]['ask']>) => Promise<z.output<T[C]['reply']>>;
};
export type Handlers = HandlersOf<typeof contract>;

/** A failure with a message that is fit to be read by the user and holds no path that the page does not know. */
export class HostFault extends Error {
  readonly code: 'forbidden' | 'bad-request' | 'io';
  constructor(code: HostFault['code'], message: string) {
    super(message);
    this.code = code;
  }
}

const refuse = (code: HostFault['code'], message: string): Reply<never> => ({ ok: false, code, message });

/**
 * Answers one message, whoever brought it: known channel, valid ask, handler, valid reply. Never throws. What goes wrong inside
 * a handler unforeseen is told to `report` in full and to the page only as a code, because it may name paths.
 */
export async function dispatch<T extends Table>(
  table: T,
  handlers: HandlersOf<T>,
  channel: string,
  ask: unknown,
  report: (error: unknown) => void,
): Promise<Reply<unknown>> {
  const entry = Object.hasOwn(table, channel) ? table[channel] : undefined;
  if (!entry) return refuse('bad-request', 'no such channel');
  const asked = entry.ask.safeParse(ask);
  if (!asked.success) return refuse('bad-request', `${channel}: the message does not have the form agreed`);
  try {
    const handler = handlers[channel] as (ask: unknown) => Promise<unknown>;
    const answered = entry.reply.safeParse(await handler(asked.data));
    if (!answered.success)
      throw new Error(`${channel}: our own answer does not have the form agreed: ${answered.error.message}`);
    return { ok: true, value: answered.data };
  } catch (error) {
    if (error instanceof HostFault) return refuse(error.code, error.message);
    report(error);
    const code = (error as NodeJS.ErrnoException)?.code;
    return refuse(
      'io',
      typeof code === 'string' ? `the system answered ${code}` : 'something went wrong in the program itself',
    );
  }
}
