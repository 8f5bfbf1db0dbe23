import { render } from 'preact';
import type { DeskCommand } from '../app/contract/host.ts';
import { desktopBridge } from './bridge/host.ts';
import { Desk } from './desk.tsx';
import { openAbout } from './start/about-dialog.tsx';
import { greetHost } from './start/start.tsx';
import { pressShortcut } from './start/top-bar.tsx';
import { keepUnsavedWork } from './state/autosave.ts';
import { redoEdit, undoEdit } from './state/document.ts';
import { openByDialog, reportUnsaved, save, saveAs, takeOpened } from './state/files.ts';
import { followMaps } from './maps/map-state.ts';
import { followScheme } from './state/studies.ts';

/** What the host's own menu may ask for. */
const commands: { readonly [C in DeskCommand]: () => unknown } = {
  open: openByDialog,
  save,
  'save-as': saveAs,
  undo: undoEdit,
  redo: redoEdit,
  about: openAbout,
};

followScheme();
followMaps();
reportUnsaved();
keepUnsavedWork();
render(<Desk />, document.getElementById('desk') as HTMLElement);
document.addEventListener('keydown', (event) => {
  if (pressShortcut(event)) event.preventDefault();
});
desktopBridge?.listen((event) => {
  if (event.kind === 'opened') takeOpened(event.opened);
  else commands[event.command]();
});
void greetHost();
