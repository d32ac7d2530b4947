import { Menu, type MenuItemConstructorOptions } from 'electron';
import type { ShellCommand } from '../../contract/bridge.ts';

/** Sets the application's menu. What the program itself does goes to the page as a command. */
export function setMenu(send: (command: ShellCommand) => void): void {
  const isMac = process.platform === 'darwin';
  const item = (label: string, command: ShellCommand, accelerator?: string): MenuItemConstructorOptions => ({
    label,
    click: () => send(command),
    ...(accelerator === undefined ? {} : { accelerator }),
  });
  /** Shown with its keys, which the page handles: in a text field they mean something else. */
  const pageKeys = (label: string, command: ShellCommand, accelerator: string): MenuItemConstructorOptions => ({
    ...item(label, command, accelerator),
    registerAccelerator: false,
  });
  const divider: MenuItemConstructorOptions = { type: 'separator' };

  const menu = Menu.buildFromTemplate([
    ...(isMac ? [{ role: 'appMenu' } as const] : []),
    {
      label: '&File',
      submenu: [
        item('New notebook…', 'new notebook', 'CmdOrCtrl+N'),
        item('Open notebook…', 'open notebook', 'CmdOrCtrl+O'),
        item('Save notebook as…', 'save notebook as', 'CmdOrCtrl+Shift+S'),
        divider,
        item('Import cell…', 'import cell', 'CmdOrCtrl+I'),
        divider,
        isMac ? { role: 'close' } : { role: 'quit' },
      ],
    },
    {
      label: '&Edit',
      submenu: [
        pageKeys('Undo', 'undo', 'CmdOrCtrl+Z'),
        pageKeys('Redo', 'redo', isMac ? 'Shift+Cmd+Z' : 'Ctrl+Y'),
        divider,
        { role: 'cut' },
        { role: 'copy' },
        { role: 'paste' },
        { role: 'selectAll' },
      ],
    },
    {
      label: '&Plan',
      submenu: [pageKeys('Rehearse', 'rehearse', 'Space'), item('All actions…', 'command palette', 'CmdOrCtrl+K')],
    },
    {
      label: '&View',
      submenu: [
        item('Light or dark', 'toggle theme'),
        divider,
        { role: 'zoomIn' },
        { role: 'zoomOut' },
        { role: 'resetZoom' },
        { role: 'togglefullscreen' },
      ],
    },
    ...(isMac ? [{ role: 'windowMenu' } as const] : []),
    { label: '&Help', submenu: [item('Keys', 'keys')] },
  ]);
  Menu.setApplicationMenu(menu);
}
