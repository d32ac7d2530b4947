// The browser shell as scripts/start.mjs runs it: for machines where Electron cannot.
import { mkdirSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { EngineClient } from '../engine-client.ts';
import { defaultNotebook } from '../home.ts';
import { startWithNode } from '../start-with-node.ts';
import { openAppWindow, type AppWindow } from './app-window.ts';
import { findBrowser, hasDisplay } from './find-browser.ts';
import { serve, type Served } from './server.ts';

/** How long a last save may take when all tabs are closed. */
const lastWord_ms = 1500;

/** Serves one notebook, opens a window on it where there is a display, and settles when all is over. */
export async function runBrowserShell(notebook: string | undefined): Promise<void> {
  const path = notebook === undefined ? defaultNotebook() : resolve(notebook);
  if (notebook === undefined) mkdirSync(dirname(path), { recursive: true });
  // Beside this file once it is bundled.
  const client = new EngineClient(startWithNode(join(import.meta.dirname, 'engine.cjs')), path);
  const served = await serve({
    pages: join(import.meta.dirname, '../renderer'),
    client,
    startFolder: dirname(path),
  });

  console.log(`Holdfast, notebook ${path}`);
  const window = openWindow(served.newAddress);
  console.log(`Open in a browser of the Chromium family on this computer (works once): ${served.newAddress()}`);
  console.log('Ends a minute after its last tab is closed; Ctrl+C ends it now.');
  if (process.stdin.isTTY) {
    console.log('Enter shows a fresh address.');
    process.stdin.on('data', () => console.log(served.newAddress()));
  }

  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.once(signal, () => void served.close());
  await served.closed;
  process.stdin.pause();
  window?.close();
  await window?.ended;
  await client.quiet(lastWord_ms);
  await client.stop();
}

function openWindow(newAddress: Served['newAddress']): AppWindow | null {
  if (!hasDisplay()) return null;
  const browser = findBrowser();
  if (!browser) {
    console.log('No browser of the Chromium family was found (CHROMIUM may name one).');
    return null;
  }
  const window = openAppWindow(browser, newAddress);
  const opened = Date.now();
  void window.ended.then((how) => {
    if (Date.now() - opened < 5000) console.log(`${browser} opened no window (${how}).`);
  });
  return window;
}
