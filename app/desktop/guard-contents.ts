import type { WebContents } from 'electron';
import { isOurs } from './page-protocol.ts';

type Cancellable = { preventDefault(): void };
type Guarded = Pick<WebContents, 'setWindowOpenHandler'> & {
  on(event: 'will-attach-webview', listener: (event: Cancellable) => void): unknown;
  on(
    event: 'will-navigate' | 'will-frame-navigate' | 'will-redirect',
    listener: (event: Cancellable & { readonly url: string }) => void,
  ): unknown;
};

/**
 * Keeps a window on the page that it was opened with: it reloads, and goes nowhere else. No second windows, no embedded views.
 * The desk has no outside links, so nothing is handed to the system's browser either.
 */
export function guardContents(contents: Guarded): void {
  const stay = (event: Cancellable & { readonly url: string }) => {
    if (!isOurs(event.url)) event.preventDefault();
  };
  contents.on('will-navigate', stay);
  contents.on('will-frame-navigate', stay);
  contents.on('will-redirect', stay);
  contents.on('will-attach-webview', (event) => event.preventDefault());
  contents.setWindowOpenHandler(() => ({ action: 'deny' }));
}
