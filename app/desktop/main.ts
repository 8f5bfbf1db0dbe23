import { readFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { app, BrowserWindow, dialog, ipcMain, Menu, protocol, session } from 'electron/main';
import { DESK_EVENT } from '../contract/channels.ts';
import { HostFault } from '../contract/dispatch.ts';
import type { DeskEvent } from '../contract/host.ts';
import { fileHost } from '../files/file-handlers.ts';
import { printDocument } from '../files/print-document.ts';
import { RecentFiles } from '../files/recent-files.ts';
import { settingsFolder } from '../files/settings-folder.ts';
import { shipped } from '../files/shipped.ts';
import { systemDialogs } from './dialogs.ts';
import { guardContents } from './guard-contents.ts';
import { menuTemplate } from './menu.ts';
import { answerPage, isAllowedRequest, PAGE_SCHEME, PAGE_URL } from './page-protocol.ts';
import { guardSession } from './permissions.ts';
import { serve } from './serve.ts';
import { startExample, startFile } from './start-file.ts';
import { windowOptions } from './window-options.ts';

const BUILT = dirname(import.meta.dirname);
const PRELOAD = join(BUILT, 'preload', 'preload.cjs');
const SCREENS = join(BUILT, 'renderer');

app.enableSandbox();
// Without a graphics card the massing is drawn in software; the only page that can use it is our own.
app.commandLine.appendSwitch('enable-unsafe-swiftshader');
protocol.registerSchemesAsPrivileged([
  { scheme: PAGE_SCHEME, privileges: { standard: true, secure: true, supportFetchAPI: true } },
]);

let window: BrowserWindow | null = null;
let isUnsaved = false;
/** Set by the command line, a double click before the window stands, or a second start. */
let startWith = startFile(process.argv, app.isPackaged, process.cwd());

const report = (error: unknown): void => console.error(error);
const say = (event: DeskEvent): void => window?.webContents.send(DESK_EVENT, event);

/** Serves the built screens, and nothing else, on our own protocol; every other address is cancelled. */
function servePages(): void {
  protocol.handle(PAGE_SCHEME, async (request) => {
    const answer = answerPage(SCREENS, request.method, request.url);
    const body = answer.path === null ? null : await readFile(answer.path).catch(() => null);
    return new Response(body, {
      status: body === null && answer.status === 200 ? 404 : answer.status,
      headers: answer.headers,
    });
  });
  session.defaultSession.webRequest.onBeforeRequest((request, decide) =>
    decide({ cancel: !isAllowedRequest(request.url) }),
  );
}

/** Asks before unsaved work leaves the screen; it also waits in recovery. */
function confirmClose(closing: BrowserWindow): boolean {
  if (!isUnsaved) return true;
  const chosen = dialog.showMessageBoxSync(closing, {
    type: 'warning',
    message: 'This scheme has changes that are not saved.',
    detail: 'If you close now, they wait to be recovered at the next start.',
    buttons: ['Keep working', 'Close without saving'],
    defaultId: 0,
    cancelId: 0,
  });
  return chosen === 1;
}

/** A page that died takes no work with it (autosave), and is drawn again when the user wants it. */
async function onPageGone(gone: BrowserWindow): Promise<void> {
  const { response } = await dialog.showMessageBox(gone, {
    type: 'error',
    message: 'The window stopped working.',
    detail: 'What was not saved waits to be recovered.',
    buttons: ['Open it again', 'Quit'],
    defaultId: 0,
  });
  isUnsaved = false;
  if (response === 0) gone.reload();
  else gone.destroy();
}

function openWindow(): void {
  const opened = new BrowserWindow(windowOptions(PRELOAD, shipped('assets', 'icons', 'icon.png')));
  window = opened;
  opened.once('ready-to-show', () => opened.show());
  opened.on('close', (event) => {
    if (!confirmClose(opened)) event.preventDefault();
  });
  opened.on('closed', () => {
    window = null;
    isUnsaved = false;
  });
  // The page asks on its own in a browser; here the question above has been answered already.
  opened.webContents.on('will-prevent-unload', (event) => event.preventDefault());
  opened.webContents.on('render-process-gone', () => void onPageGone(opened));
  void opened.loadURL(PAGE_URL);
}

async function start(): Promise<void> {
  await app.whenReady();
  const dataDir = settingsFolder();
  const [latest] = await new RecentFiles(dataDir).list();
  const shown = (): BrowserWindow => {
    if (!window) throw new HostFault('forbidden', 'the window has closed');
    return window;
  };
  const files = fileHost({
    kind: 'desktop',
    version: app.getVersion(),
    dataDir,
    startWith,
    example: startExample(process.argv),
    dialogs: systemDialogs(dialog, shown, latest ? dirname(latest.path) : app.getPath('documents')),
    pdf: printDocument,
  });
  const sayWhyNot = (error: unknown): void => {
    if (!(error instanceof HostFault)) report(error);
    dialog.showErrorBox(
      'The scheme was not opened',
      error instanceof HostFault ? error.message : 'Something went wrong in the program itself.',
    );
  };
  const openInWindow = async (path: string): Promise<void> => {
    window?.focus();
    await files.openChosen(path).then((opened) => say({ kind: 'opened', opened }), sayWhyNot);
  };
  serve(
    ipcMain,
    files.handlers,
    {
      'desk:dropped': ({ path }) => files.openChosen(path),
      'desk:unsaved': async (now) => {
        isUnsaved = now;
        return null;
      },
    },
    report,
  );
  app.on('open-file', (event, path) => {
    event.preventDefault();
    void openInWindow(path);
  });
  app.on('second-instance', (_event, words, folder) => {
    const path = startFile(words, app.isPackaged, folder);
    if (path !== null) void openInWindow(path);
    else window?.focus();
  });
  guardSession(session.defaultSession);
  servePages();
  Menu.setApplicationMenu(
    Menu.buildFromTemplate(
      menuTemplate(process.platform, app.isPackaged, (command) => say({ kind: 'command', command })),
    ),
  );
  // The page will ask for the scheme itself (host:hello); what it could not open is said here.
  if (startWith !== null) await files.openChosen(startWith).catch(sayWhyNot);
  openWindow();
}

app.on('web-contents-created', (_event, contents) => guardContents(contents));
app.on('window-all-closed', () => app.quit());
app.once('open-file', (event, path) => {
  event.preventDefault();
  startWith ??= path;
});

if (app.requestSingleInstanceLock()) {
  start().catch((error: unknown) => {
    report(error);
    dialog.showErrorBox('Shadewright did not start', error instanceof Error ? error.message : String(error));
    app.exit(3);
  });
} else {
  app.quit();
}
