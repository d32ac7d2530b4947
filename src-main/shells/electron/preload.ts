// What the page gets of the outside: five functions, no Electron and no Node.
import { contextBridge, ipcRenderer, type IpcRendererEvent } from 'electron';
import type { Bridge, FolderListing } from '../../contract/bridge.ts';
import type { Answer } from '../../contract/requests.ts';

/** Calls back for every message of a kind until the returned function is called. */
function listen(channel: 'event' | 'command', listener: (message: never) => void): () => void {
  // What the shell sends on a channel is what its listeners take.
  const receive = (_event: IpcRendererEvent, message: unknown): void => listener(message as never);
  ipcRenderer.on(channel, receive);
  return () => void ipcRenderer.off(channel, receive);
}

const noFolders: Answer<FolderListing> = {
  ok: false,
  refusals: [
    {
      code: 'file-outside-folder',
      thing: 'list of folders',
      place: 'this window',
      value: 'not offered',
      remedy: 'choose a notebook in the dialog',
    },
  ],
};

const bridge: Bridge = {
  shell: 'electron',
  ask: (name, question) => ipcRenderer.invoke('ask', name, question) as ReturnType<Bridge['ask']> as never,
  onEvent: (listener) => listen('event', listener),
  onCommand: (listener) => listen('command', listener),
  chooseNotebook: (what, suggestion) =>
    ipcRenderer.invoke('choose notebook', what, suggestion) as Promise<string | null>,
  listFolder: () => Promise.resolve(noFolders),
};

contextBridge.exposeInMainWorld('holdfast', bridge);
