import { BrowserWindow, screen } from 'electron';
import { join } from 'node:path';
import { readWindowState, writeWindowState } from './window-state.ts';

/** The one window. It shows itself once there is something to see. */
export function createWindow(preload: string, dataFolder: string): BrowserWindow {
  const stateFile = join(dataFolder, 'window.json');
  const kept = readWindowState(
    stateFile,
    screen.getAllDisplays().map((display) => display.workArea),
  );
  const window = new BrowserWindow({
    ...(kept?.bounds ?? { width: 1440, height: 900 }),
    minWidth: 900,
    minHeight: 600,
    show: false,
    title: 'Holdfast',
    webPreferences: { preload, sandbox: true, contextIsolation: true, nodeIntegration: false, spellcheck: false },
  });
  if (kept?.maximized) window.maximize();
  window.once('ready-to-show', () => window.show());
  window.on('close', () => {
    writeWindowState(stateFile, { bounds: window.getNormalBounds(), maximized: window.isMaximized() });
  });
  return window;
}
