import { PAGE_HEADERS } from '../contract/page-headers.ts';
import { bundleFile } from '../files/bundle-file.ts';

/** Our own protocol: unlike `file:` it has an origin, and serves one folder and nothing else. */
export const PAGE_SCHEME = 'shadewright';
export const PAGE_ORIGIN = `${PAGE_SCHEME}://desk`;
export const PAGE_URL = `${PAGE_ORIGIN}/index.html`;

/** Origin of an address by its scheme and host: `URL.origin` is "null" for schemes that the URL standard does not know. */
export function originOf(address: string): string | null {
  try {
    const { protocol, host, username, password } = new URL(address);
    return username === '' && password === '' ? `${protocol}//${host}` : null;
  } catch {
    return null;
  }
}

/** Whether an address is a page of ours: what a window may show and whose messages main answers. */
export const isOurs = (address: string): boolean => originOf(address) === PAGE_ORIGIN;

/** Addresses that a page may ask for at all; the desk needs no network, so everything else is cancelled before it leaves. */
export function isAllowedRequest(address: string): boolean {
  return (
    isOurs(address) ||
    address.startsWith(`blob:${PAGE_ORIGIN}/`) ||
    address.startsWith('data:') ||
    address.startsWith('devtools:')
  );
}

export type PageAnswer =
  | { readonly status: 200; readonly path: string; readonly headers: { readonly [header: string]: string } }
  | { readonly status: 404 | 405; readonly path: null; readonly headers: { readonly [header: string]: string } };

/** What a request of our protocol gets: a file of the built screens, or a refusal. */
export function answerPage(folder: string, method: string, address: string): PageAnswer {
  const refused = (status: 404 | 405): PageAnswer => ({
    status,
    path: null,
    headers: { ...PAGE_HEADERS, 'content-type': 'text/plain' },
  });
  if (method !== 'GET') return refused(405);
  const file = isOurs(address) ? bundleFile(folder, new URL(address).pathname) : null;
  return file
    ? { status: 200, path: file.path, headers: { ...PAGE_HEADERS, 'content-type': file.type } }
    : refused(404);
}
