import { contextBridge, ipcRenderer, webUtils } from 'electron/renderer';
import { CHANNELS, DESK_DROPPED, DESK_EVENT, DESK_UNSAVED } from '../contract/channels.ts';
import type { Bridge, DeskEvent, Host } from '../contract/host.ts';

/** One function a channel: the page can ask what the contract has and nothing else. */
const host = Object.freeze(
  Object.fromEntries(CHANNELS.map((channel) => [channel, (ask: unknown) => ipcRenderer.invoke(channel, ask)])),
) as unknown as Host;

/** Where a dropped file lies; empty for one that a script made, and for what is no file at all. */
function pathOf(file: unknown): string {
  try {
    return webUtils.getPathForFile(file as never);
  } catch {
    return '';
  }
}

const bridge: Bridge = Object.freeze({
  host,
  listen: (hear: (event: DeskEvent) => void) => {
    const onEvent = (_event: unknown, said: DeskEvent) => hear(said);
    ipcRenderer.on(DESK_EVENT, onEvent);
    return () => void ipcRenderer.off(DESK_EVENT, onEvent);
  },
  dropped: (file: unknown) => ipcRenderer.invoke(DESK_DROPPED, { path: pathOf(file) }),
  setUnsaved: (isUnsaved: boolean) => void ipcRenderer.invoke(DESK_UNSAVED, isUnsaved),
});

contextBridge.exposeInMainWorld('shadewright', bridge);
