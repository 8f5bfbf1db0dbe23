/**
 * How the loopback host and its page write a message: JSON, with each run of bytes as `{ "$bytes": base64 }`. The desktop needs
 * none of this: its messages are cloned as they are. No library and no Node in here, so that the page can import it.
 *
 * The page's side of the conversation, all of it `POST` to its own address:
 * - `/claim` with the header `x-shadewright-launch: <token from the address's fragment, #t=token>` once, answered by `{ ok, value: session }`;
 *   the page then drops the fragment and keeps the session for itself (sessionStorage, so that a reload stays signed in).
 * - `/host/<channel>` with `x-shadewright-session: <session>` and an encoded ask, answered by an encoded `Reply`.
 * - `/stay` with the same header: an answer that never ends while the window is open. The host takes its end, with no new one
 *   within some seconds, for the window having been closed. The page only has to read it, and to ask again when it breaks.
 */
export const LAUNCH_HEADER = 'x-shadewright-launch';
export const SESSION_HEADER = 'x-shadewright-session';

const CHUNK = 0x8000;

function toBase64(bytes: Uint8Array): string {
  let binary = '';
  for (let i = 0; i < bytes.length; i += CHUNK) binary += String.fromCharCode(...bytes.subarray(i, i + CHUNK));
  return btoa(binary);
}

function fromBase64(text: string): Uint8Array {
  const binary = atob(text);
  const bytes = new Uint8Array(binary.length);
  for (let i = 0; i < binary.length; i++) bytes[i] = binary.charCodeAt(i);
  return bytes;
}

type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json };

function toJson(value: unknown): Json {
  if (value instanceof Uint8Array) return { $bytes: toBase64(value) };
  if (Array.isArray(value)) return value.map((item) => toJson(item ?? null));
  if (typeof value === 'object' && value !== null) {
    const entries = Object.entries(value).filter(([, item]) => item !== undefined);
    return Object.fromEntries(entries.map(([key, item]) => [key, toJson(item)]));
  }
  if (typeof value === 'number' || typeof value === 'string' || typeof value === 'boolean') return value;
  if (value === null || value === undefined) return null;
  throw new TypeError(`a ${typeof value} cannot be sent`);
}

/** A message as text. `undefined` fields are left out, other things that JSON has no word for throw. */
export const encode = (value: unknown): string => JSON.stringify(toJson(value));

/**
 * A message from its text. An object whose only key is `$bytes` becomes bytes; a key `__proto__` stays an ordinary key.
 * @throws {Error} when the text is not JSON or its base64 is broken
 */
export function decode(text: string): unknown {
  return JSON.parse(text, (_key, value: unknown) => {
    if (typeof value !== 'object' || value === null || !Object.hasOwn(value, '$bytes')) return value;
    const { $bytes } = value as { $bytes: unknown };
    return typeof $bytes === 'string' && Object.keys(value).length === 1 ? fromBase64($bytes) : value;
  });
}
