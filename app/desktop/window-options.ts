import type { BrowserWindowConstructorOptions } from 'electron';

/** Every safety setting of a window, said outright rather than left to a default that a later version may move. */
export const SAFE_PREFERENCES = {
  contextIsolation: true,
  sandbox: true,
  webSecurity: true,
  nodeIntegration: false,
  nodeIntegrationInWorker: false,
  nodeIntegrationInSubFrames: false,
  allowRunningInsecureContent: false,
  experimentalFeatures: false,
  webviewTag: false,
  navigateOnDragDrop: false,
  spellcheck: false,
} as const;

/** The one window of the desk. @param preload absolute path of the bundled preload */
export const windowOptions = (preload: string, icon: string): BrowserWindowConstructorOptions => ({
  width: 1360,
  height: 880,
  minWidth: 720,
  minHeight: 480,
  show: false,
  backgroundColor: '#f7f4ed',
  title: 'Shadewright',
  icon,
  webPreferences: { ...SAFE_PREFERENCES, preload },
});
