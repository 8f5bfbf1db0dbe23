import { readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test, vi } from 'vitest';
import { hasDisplay, windowSwitches } from '../../../app/browser/browser-window.ts';
import { browserPlaces } from '../../../app/browser/find-browser.ts';
import { guardContents } from '../../../app/desktop/guard-contents.ts';
import { menuTemplate } from '../../../app/desktop/menu.ts';
import { DESK_COMMANDS } from '../../../app/contract/host.ts';
import { answerPage, isAllowedRequest, isOurs, PAGE_URL } from '../../../app/desktop/page-protocol.ts';
import { guardSession, isGranted } from '../../../app/desktop/permissions.ts';
import { isTrusted } from '../../../app/desktop/serve.ts';
import { startExample, startFile } from '../../../app/desktop/start-file.ts';
import { windowOptions } from '../../../app/desktop/window-options.ts';
import { desktopHandles, ourFrame } from '../../helpers/host-client.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const root = resolve(import.meta.dirname, '../../..');

test('a window says every safety setting outright', () => {
  expect(windowOptions('/p/preload.cjs', '/p/icon.png').webPreferences).toMatchObject({
    contextIsolation: true,
    sandbox: true,
    webSecurity: true,
    nodeIntegration: false,
    webviewTag: false,
    navigateOnDragDrop: false,
  });
});

describe('permissions', () => {
  test('are refused but for the one that is listed with its reason', () => {
    for (const permission of [
      'media',
      'geolocation',
      'notifications',
      'clipboard-read',
      'openExternal',
      'fileSystem',
      'usb',
      'hid',
      'serial',
      'unknown',
      '__proto__',
      'toString',
    ])
      expect(isGranted(permission), permission).toBe(false);
    expect(isGranted('clipboard-sanitized-write')).toBe(true);
  });

  test('all three questions of a session are answered, and downloads stopped', () => {
    const session = {
      setPermissionRequestHandler: vi.fn<Parameters<typeof guardSession>[0]['setPermissionRequestHandler']>(),
      setPermissionCheckHandler: vi.fn<Parameters<typeof guardSession>[0]['setPermissionCheckHandler']>(),
      setDevicePermissionHandler: vi.fn<Parameters<typeof guardSession>[0]['setDevicePermissionHandler']>(),
      on: vi.fn<Parameters<typeof guardSession>[0]['on']>(),
    };
    guardSession(session);
    const answer = vi.fn();
    session.setPermissionRequestHandler.mock.calls[0]?.[0](null, 'media', answer);
    expect(answer.mock.calls).toEqual([[false]]);
    expect(session.setPermissionCheckHandler.mock.calls[0]?.[0](null, 'geolocation')).toBe(false);
    expect(session.setDevicePermissionHandler.mock.calls[0]?.[0]()).toBe(false);
    const preventDefault = vi.fn();
    session.on.mock.calls[0]?.[1]({ preventDefault });
    expect(preventDefault).toHaveBeenCalledOnce();
  });
});

describe('addresses', () => {
  test.each([
    'https://desk/index.html',
    'shadewright://other/index.html',
    'shadewright://desk.evil/',
    'shadewright://u:p@desk/',
    'file:///etc/passwd',
    'about:blank',
    'javascript:1',
    '',
    'shadewright:desk',
  ])('%s is not ours', (address) => expect(isOurs(address)).toBe(false));
  test('the page is ours, and may ask for itself, blobs and data alone', () => {
    expect(isOurs(PAGE_URL)).toBe(true);
    for (const address of [PAGE_URL, 'blob:shadewright://desk/1-2', 'data:image/png;base64,AA=='])
      expect(isAllowedRequest(address)).toBe(true);
    for (const address of [
      'https://example.com/',
      'http://127.0.0.1/',
      'file:///etc/passwd',
      'ws://x/',
      'blob:https://example.com/1',
      'ftp://x/',
    ])
      expect(isAllowedRequest(address), address).toBe(false);
  });
  test('the protocol serves the screens with the policy, by GET, and nothing beside them', () => {
    const good = answerPage('/opt/renderer', 'GET', PAGE_URL);
    expect(good).toMatchObject({ status: 200, path: join('/opt/renderer', 'index.html') });
    expect(good.headers['content-security-policy']).toContain("default-src 'none'");
    expect(good.headers['x-content-type-options']).toBe('nosniff');
    expect(answerPage('/opt/renderer', 'POST', PAGE_URL).status).toBe(405);
    for (const address of [
      'shadewright://desk/a%2f..%2f..%2fsecret.js',
      'shadewright://desk/..%2f..%2fetc/passwd.txt',
      'shadewright://elsewhere/index.html',
    ])
      expect(answerPage('/opt/renderer', 'GET', address).status, address).toBe(404);
  });
});

test('a window goes nowhere, embeds nothing and opens no other', () => {
  const listeners = new Map<string, (event: never) => void>();
  const setWindowOpenHandler = vi.fn<Parameters<typeof guardContents>[0]['setWindowOpenHandler']>();
  guardContents({
    on: (event: string, listener: (event: never) => void) => void listeners.set(event, listener),
    setWindowOpenHandler,
  });
  const isStopped = (event: string, url: string): boolean => {
    let stopped = false;
    (listeners.get(event) as (e: object) => void)({ url, preventDefault: () => (stopped = true) });
    return stopped;
  };
  for (const event of ['will-navigate', 'will-frame-navigate', 'will-redirect']) {
    expect(isStopped(event, 'https://example.com/')).toBe(true);
    expect(isStopped(event, PAGE_URL)).toBe(false);
  }
  expect(isStopped('will-attach-webview', PAGE_URL)).toBe(true);
  expect(setWindowOpenHandler.mock.calls[0]?.[0]({} as never)).toEqual({ action: 'deny' });
});

describe('messages to main', () => {
  test('are taken from the top frame of our own page alone', () => {
    const sender = (senderFrame: object | null) => ({ senderFrame }) as never;
    expect(isTrusted(ourFrame)).toBe(true);
    expect(isTrusted(sender(null))).toBe(false);
    expect(isTrusted(sender({ parent: {}, url: PAGE_URL }))).toBe(false);
    expect(isTrusted(sender({ parent: null, url: 'https://example.com/' }))).toBe(false);
    expect(isTrusted(sender({ parent: null, url: '' }))).toBe(false);
  });

  test('of a stranger are refused on every channel, before anything is looked at', async () => {
    const handles = desktopHandles({ dataDir: tempFolder() });
    expect(handles.size).toBeGreaterThan(14);
    for (const [channel, handle] of handles)
      expect(await handle({ senderFrame: null } as never, null), channel).toMatchObject({
        ok: false,
        code: 'forbidden',
      });
  });

  test('about a dropped file need a path, which a file made by a script has not', async () => {
    const dropped = desktopHandles({ dataDir: tempFolder() }).get('desk:dropped');
    expect(await dropped?.(ourFrame, { path: '' })).toMatchObject({ ok: false, code: 'bad-request' });
    expect(await dropped?.(ourFrame, { path: join(root, 'package.json') })).toMatchObject({
      ok: true,
      value: { name: 'package.json' },
    });
  });
});

test('only the one wrapper speaks to ipcMain', () => {
  const main = readFileSync(join(root, 'app/desktop/main.ts'), 'utf8');
  expect(main.match(/ipcMain/g)).toHaveLength(2);
  expect(main).not.toMatch(/ipcMain\.(on|handle)/);
});

test('the built preload is one CommonJS file that exposes one object and no way to name a channel', () => {
  const preload = readFileSync(join(root, 'out/preload/preload.cjs'), 'utf8');
  expect(preload.match(/exposeInMainWorld/g)).toHaveLength(1);
  expect(preload).toContain('require("electron/renderer")');
  expect(preload).not.toMatch(/require\("(?!electron\/renderer")/);
  expect(preload.length).toBeLessThan(8000);
});

test('the menu has each command once and shows the keys that the page handles', () => {
  const sent: string[] = [];
  for (const platform of ['linux', 'darwin', 'win32'] as const) {
    sent.length = 0;
    const items = menuTemplate(platform, true, (command) => sent.push(command)).flatMap(
      (menu) => (menu.submenu ?? []) as Electron.MenuItemConstructorOptions[],
    );
    for (const item of items) (item.click as (() => void) | undefined)?.();
    expect(sent.sort()).toEqual([...DESK_COMMANDS].sort());
    for (const item of items.filter((it) => it.accelerator))
      expect(item.registerAccelerator).toBe(platform === 'darwin');
    expect(items.some((item) => item.role === 'toggleDevTools')).toBe(false);
  }
});

test('the file to start with is the last word that is no switch', () => {
  expect(startFile(['/app/shadewright', '/s/a.json'], true, '/w')).toBe('/s/a.json');
  expect(startFile(['electron', '.', '--no-sandbox', 'a.json'], false, '/w')).toBe(resolve('/w', 'a.json'));
  expect(startFile(['electron', '.'], false, '/w')).toBeNull();
  expect(startFile(['/app/shadewright', '--enable-logging'], true, '/w')).toBeNull();
  expect(startFile(['electron', '.', '--example=tannery-yard'], false, '/w')).toBeNull();
  expect(startExample(['electron', '.', '--example=tannery-yard'])).toBe('tannery-yard');
  expect(startExample(['electron', '.', 'a.json'])).toBeNull();
});

describe('the browser’s window', () => {
  test('stands alone, in a profile of its own', () => {
    const switches = windowSwitches('http://127.0.0.1:1/#t=x', '/tmp/profile', false);
    expect(switches).toContain('--app=http://127.0.0.1:1/#t=x');
    expect(switches).toContain('--user-data-dir=/tmp/profile');
    expect(switches).not.toContain('--no-sandbox');
    expect(windowSwitches('x', 'y', true)).toContain('--no-sandbox');
  });
  test('is looked for where each system has it, the user’s choice first', () => {
    expect(
      browserPlaces({ platform: 'linux', env: { PATH: '/a:/b', SHADEWRIGHT_BROWSER: '/mine' } }).slice(0, 3),
    ).toEqual(['/mine', '/a/chromium', '/b/chromium']);
    expect(browserPlaces({ platform: 'darwin', env: {} })[0]).toContain('/Applications/');
    expect(browserPlaces({ platform: 'win32', env: { PROGRAMFILES: 'C:/P' } })[0]).toContain('chrome.exe');
    expect(browserPlaces({ platform: 'linux', env: {} }).every((path) => path.startsWith('/'))).toBe(true);
  });
  test('needs a display on Linux', () => {
    expect(hasDisplay({ platform: 'linux', env: {} })).toBe(false);
    expect(hasDisplay({ platform: 'linux', env: { WAYLAND_DISPLAY: 'wayland-0' } })).toBe(true);
    expect(hasDisplay({ platform: 'darwin', env: {} })).toBe(true);
  });
});
