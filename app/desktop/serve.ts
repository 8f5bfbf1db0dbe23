import type { IpcMain, IpcMainInvokeEvent } from 'electron';
import { desktopOnly } from '../contract/desktop-only.ts';
import { dispatch, type Handlers, type HandlersOf } from '../contract/dispatch.ts';
import { contract, type Reply } from '../contract/host.ts';
import { isOurs } from './page-protocol.ts';

/** Who sent a message, as far as main may trust it. */
type Sender = Pick<IpcMainInvokeEvent, 'senderFrame'>;

/** Whether a message comes from the top frame of a page of ours; a frame that has gone (null), a sub-frame or a stranger does not. */
export function isTrusted({ senderFrame }: Sender): boolean {
  return senderFrame !== null && senderFrame.parent === null && isOurs(senderFrame.url);
}

/** Registers every channel of the two tables, each behind the sender check and the validators. The only user of `ipcMain`. */
export function serve(
  ipc: Pick<IpcMain, 'handle'>,
  handlers: Handlers,
  ownHandlers: HandlersOf<typeof desktopOnly>,
  report: (error: unknown) => void,
): void {
  const guarded = (answer: (ask: unknown) => Promise<Reply<unknown>>) => (event: Sender, ask: unknown) =>
    isTrusted(event) ? answer(ask) : { ok: false, code: 'forbidden', message: 'this page may not ask' };
  for (const channel of Object.keys(contract))
    ipc.handle(
      channel,
      guarded((ask) => dispatch(contract, handlers, channel, ask, report)),
    );
  for (const channel of Object.keys(desktopOnly))
    ipc.handle(
      channel,
      guarded((ask) => dispatch(desktopOnly, ownHandlers, channel, ask, report)),
    );
}
