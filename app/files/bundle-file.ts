import { isAbsolute, relative, resolve, sep } from 'node:path';

/** The kinds of file that the screens are built of; anything else is not served. */
const KINDS: { readonly [ending: string]: string } = {
  html: 'text/html; charset=utf-8',
  js: 'text/javascript; charset=utf-8',
  css: 'text/css; charset=utf-8',
  json: 'application/json; charset=utf-8',
  svg: 'image/svg+xml',
  png: 'image/png',
  ico: 'image/x-icon',
  ttf: 'font/ttf',
  woff: 'font/woff',
  woff2: 'font/woff2',
  txt: 'text/plain; charset=utf-8',
};

export type BundleFile = { readonly path: string; readonly type: string };

/**
 * The file of the built screens that a URL's path names; null when it leaves the folder, hides something in it or is of no
 * known kind. The path is taken apart before it meets the folder: a joined string compared by its beginning would let a
 * sibling folder through.
 * @param folder   the built screens
 * @param pathname as in `URL.pathname`, still percent-encoded
 */
export function bundleFile(folder: string, pathname: string): BundleFile | null {
  let decoded: string;
  try {
    decoded = decodeURIComponent(pathname);
  } catch {
    return null;
  }
  if (/[\0\\]/.test(decoded)) return null;
  const inside = decoded.replace(/^\/+/, '');
  const parts = (inside === '' ? 'index.html' : inside).split('/');
  if (parts.some((part) => part === '' || part.startsWith('.') || part.includes(':'))) return null;
  const path = resolve(folder, ...parts);
  const way = relative(folder, path);
  if (way === '' || isAbsolute(way) || way.split(sep)[0] === '..') return null;
  const type = KINDS[/\.([a-z0-9]+)$/i.exec(path)?.[1]?.toLowerCase() ?? ''];
  return type === undefined ? null : { path, type };
}
