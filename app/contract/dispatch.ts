import { type Answer, type Ask, type Channel, contract, type Reply } from './host.ts';

/** What a host can do, channel by channel; a handler throws `HostFault` for what the user should read. */
export type Handlers = { readonly [C in Channel]: (ask: Ask<C>) => Promise<Answer<C>> };

/** A failure with a message that is fit to be read by the user and holds no path that the page does not know. */
export class HostFault extends Error {
  readonly code: 'forbidden' | 'bad-request' | 'io';
  constructor(code: HostFault['code'], message: string) {
    super(message);
    this.code = code;
  }
}

export const isChannel = (channel: string): channel is Channel => Object.hasOwn(contract, channel);

const refuse = (code: HostFault['code'], message: string): Reply<never> => ({ ok: false, code, message });

/**
 * Answers one message, whoever brought it: known channel, valid ask, handler, valid reply. Never throws. What goes wrong inside
 * a handler unforeseen is told to `report` in full and to the page only as a code, because it may name paths.
 */
export async function dispatch(
  handlers: Handlers,
  channel: string,
  ask: unknown,
  report: (error: unknown) => void,
): Promise<Reply<unknown>> {
  if (!isChannel(channel)) return refuse('bad-request', 'no such channel');
  const entry = contract[channel];
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
