import { signal } from '@preact/signals';

/** One line for the user: what happened. Failures stay until dismissed; news goes by itself. */
export type Message = { readonly tone: 'news' | 'failure'; readonly text: string };

const NEWS_FOR_ms = 6000;

export const message = signal<Message | null>(null);
let timer: ReturnType<typeof setTimeout> | null = null;

export function tell(tone: Message['tone'], text: string): void {
  if (timer !== null) clearTimeout(timer);
  timer = null;
  message.value = { tone, text };
  if (tone === 'news') timer = setTimeout(dismissMessage, NEWS_FOR_ms);
}

export function dismissMessage(): void {
  message.value = null;
}
