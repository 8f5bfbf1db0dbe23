import { dirname, join } from 'node:path';
import type { BrowserWindow, Dialog, FileFilter } from 'electron';
import type { Dialogs } from '../files/file-handlers.ts';

const SCHEMES: FileFilter[] = [
  { name: 'Scheme', extensions: ['json', 'shadewright'] },
  { name: 'All files', extensions: ['*'] },
];

const WEATHER: FileFilter[] = [
  { name: 'Weather', extensions: ['csv', 'txt', 'tsv'] },
  { name: 'All files', extensions: ['*'] },
];

/** The system's dialogs, which start in the folder used last: without that the system would start in Downloads each time. */
export function systemDialogs(dialog: Dialog, window: () => BrowserWindow, startFolder: string): Dialogs {
  let folder = startFolder;
  const chosen = (path: string | undefined): string | null => {
    if (path === undefined || path === '') return null;
    folder = dirname(path);
    return path;
  };
  const save = async (name: string, filters: FileFilter[]) => {
    const { canceled, filePath } = await dialog.showSaveDialog(window(), { defaultPath: join(folder, name), filters });
    return canceled ? null : chosen(filePath);
  };
  const endingOf = (name: string): FileFilter[] => {
    const ending = /\.([a-z0-9]+)$/i.exec(name)?.[1];
    return ending === undefined ? [] : [{ name: ending.toUpperCase(), extensions: [ending] }];
  };
  const open = async (filters: FileFilter[]) => {
    const { canceled, filePaths } = await dialog.showOpenDialog(window(), {
      defaultPath: folder,
      properties: ['openFile'],
      filters,
    });
    return canceled ? null : chosen(filePaths[0]);
  };
  return {
    openScheme: () => open(SCHEMES),
    openWeather: () => open(WEATHER),
    saveScheme: (name) => save(name, SCHEMES),
    saveExport: (name) => save(name, endingOf(name)),
  };
}
