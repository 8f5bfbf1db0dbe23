import type { MenuItemConstructorOptions } from 'electron';
import type { DeskCommand } from '../contract/host.ts';

type Send = (command: DeskCommand) => void;

/**
 * The menu bar as data. Commands go to the page, which knows what they mean in the field that has the focus; their keys are shown
 * here and handled there (the same keys work in a browser), except on macOS, where the menu itself catches them.
 */
export function menuTemplate(platform: NodeJS.Platform, isPackaged: boolean, send: Send): MenuItemConstructorOptions[] {
  const command = (label: string, name: DeskCommand, accelerator?: string): MenuItemConstructorOptions => ({
    label,
    ...(accelerator === undefined ? {} : { accelerator, registerAccelerator: platform === 'darwin' }),
    click: () => send(name),
  });
  const line: MenuItemConstructorOptions = { type: 'separator' };
  const isMac = platform === 'darwin';
  return [
    ...(isMac ? [{ role: 'appMenu' } satisfies MenuItemConstructorOptions] : []),
    {
      label: '&File',
      submenu: [
        command('Open…', 'open', 'CmdOrCtrl+O'),
        line,
        command('Save', 'save', 'CmdOrCtrl+S'),
        command('Save as…', 'save-as', 'CmdOrCtrl+Shift+S'),
        line,
        isMac ? { role: 'close' } : { role: 'quit' },
      ],
    },
    {
      label: '&Edit',
      submenu: [
        command('Undo', 'undo', 'CmdOrCtrl+Z'),
        command('Redo', 'redo', isMac ? 'Cmd+Shift+Z' : 'Ctrl+Y'),
        line,
        { role: 'cut' },
        { role: 'copy' },
        { role: 'paste' },
        { role: 'selectAll' },
      ],
    },
    {
      label: '&View',
      submenu: [
        { role: 'resetZoom' },
        { role: 'zoomIn' },
        { role: 'zoomOut' },
        line,
        { role: 'togglefullscreen' },
        ...(isPackaged ? [] : [line, { role: 'toggleDevTools' } satisfies MenuItemConstructorOptions]),
      ],
    },
    { role: 'help', submenu: [command('About Shadewright', 'about')] },
  ];
}
