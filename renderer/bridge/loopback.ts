import { CHANNELS } from '../../app/contract/channels.ts';
import type { Answer, Ask, Channel, Host, Reply } from '../../app/contract/host.ts';
import { decode, encode, LAUNCH_HEADER, SESSION_HEADER } from '../../app/contract/wire.ts';

const SESSION_KEY = 'shadewright-session';
const AGAIN_ms = 1500;

const gone = (error: unknown): Reply<never> => ({
  ok: false,
  code: 'io',
  message: error instanceof Error ? error.message : String(error),
});

/** Trades the launch token of the address for a session, once; a reload finds the session where it was left. */
async function claim(): Promise<string> {
  const token = new URLSearchParams(location.hash.slice(1)).get('t');
  if (token === null) return sessionStorage.getItem(SESSION_KEY) ?? '';
  history.replaceState(null, '', location.pathname + location.search);
  const answer = await fetch('/claim', { method: 'POST', headers: { [LAUNCH_HEADER]: token } });
  const reply = decode(await answer.text()) as Reply<string>;
  const session = reply.ok ? reply.value : (sessionStorage.getItem(SESSION_KEY) ?? '');
  sessionStorage.setItem(SESSION_KEY, session);
  return session;
}

/** Keeps the host running while the window is open: reads an answer that never ends, and asks again when it breaks. */
async function stay(session: Promise<string>): Promise<void> {
  for (;;) {
    try {
      const answer = await fetch('/stay', { method: 'POST', headers: { [SESSION_HEADER]: await session } });
      const reader = answer.body?.getReader();
      while (reader !== undefined && !(await reader.read()).done);
    } catch {
      // The host has gone or restarts: the next round tells.
    }
    await new Promise((go) => setTimeout(go, AGAIN_ms));
  }
}

async function call<C extends Channel>(session: Promise<string>, channel: C, ask: Ask<C>): Promise<Reply<Answer<C>>> {
  try {
    const answer = await fetch(`/host/${channel}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', [SESSION_HEADER]: await session },
      body: encode(ask),
    });
    return decode(await answer.text()) as Reply<Answer<C>>;
  } catch (error) {
    return gone(error);
  }
}

/** The host that served this page on the loopback address. A host that has gone answers `io`, like any other failure. */
export function loopbackHost(): Host {
  const session = claim();
  void stay(session.catch(() => ''));
  return Object.fromEntries(
    CHANNELS.map((channel) => [channel, (ask: Ask<typeof channel>) => call(session, channel, ask)]),
  ) as unknown as Host;
}
