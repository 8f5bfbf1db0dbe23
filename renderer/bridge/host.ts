import type { Bridge } from '../../app/contract/host.ts';
import { loopbackHost } from './loopback.ts';
import { withPageFiles } from './page-files.ts';

declare global {
  interface Window {
    /** Put there by the desktop's preload; absent in a browser. */
    readonly shadewright?: Bridge;
  }
}

const desktop = window.shadewright ?? null;

/** The one way to what is privileged: the desktop's preload, or the loopback host that served this page. */
export const host = desktop?.host ?? withPageFiles(loopbackHost());

/** What only a desktop can do; null in a browser. */
export const desktopBridge = desktop;
