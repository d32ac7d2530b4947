// Real Electron windows for tests.
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { dirname, join, resolve } from 'node:path';
import { _electron, type ElectronApplication, type Page } from 'playwright-core';
import { complaintsOf } from './chromium.ts';
import { mayHaveDisplay, type Display } from './display.ts';

/** The runtime's program: in the folder that ELECTRON_RUNTIME names, else in the installed package; null for none. */
function runtime(): string | null {
  const named = process.env['ELECTRON_RUNTIME'];
  if (named) return join(named, 'electron');
  const folder = dirname(createRequire(import.meta.url).resolve('electron/package.json'));
  const pathFile = join(folder, 'path.txt');
  const program = existsSync(pathFile) ? join(folder, 'dist', readFileSync(pathFile, 'utf8')) : null;
  return program !== null && existsSync(program) ? program : null;
}

/** Why there can be no window on this machine; null where there can. */
export function whyNoWindow(): string | null {
  if (runtime() === null) return 'no Electron runtime: ELECTRON_RUNTIME names none and the electron package holds none';
  if (!mayHaveDisplay()) return 'no display, and no Xvfb to make one';
  return null;
}

// Playwright can hang for ever when it attaches while a window is already loading, so the application waits for a word
// before it opens one.
const waiting = (main: string): string => `
  const { app } = require('electron');
  const ready = app.whenReady();
  const word = new Promise((resolve) => { globalThis.openWindows = resolve; });
  app.whenReady = () => ready.then(() => word);
  require(${JSON.stringify(main)});
`;

export interface Opened {
  readonly application: ElectronApplication;
  readonly page: Page;
  readonly complaints: readonly string[];
  readonly close: () => Promise<void>;
}

/** Opens a main file in a window of its own, with its own folder for everything it writes. */
export async function openElectron(options: {
  readonly main: string;
  readonly display: Display;
  /** Where the application keeps its files; made for this run and removed with it when absent. */
  readonly home?: string;
  readonly env?: Readonly<Record<string, string>>;
  readonly args?: readonly string[];
}): Promise<Opened> {
  const program = runtime();
  if (program === null) throw new Error('no Electron runtime');
  const folder = mkdtempSync(join(tmpdir(), 'holdfast-electron-'));
  writeFileSync(join(folder, 'waiting.js'), waiting(resolve(options.main)));
  writeFileSync(join(folder, 'package.json'), '{ "name": "holdfast", "version": "0.1.0", "main": "waiting.js" }');
  const env = Object.fromEntries(
    Object.entries({
      ...process.env,
      DISPLAY: options.display.name,
      HOLDFAST_HOME: options.home ?? join(folder, 'home'),
      ENGINE_NODE: process.execPath,
      ...options.env,
    }).filter((entry): entry is [string, string] => entry[1] !== undefined),
  );
  const application = await _electron.launch({
    executablePath: program,
    // The sandbox of the processes is off for root only, which test machines run as.
    args: ['--no-sandbox', '--disable-gpu', `--user-data-dir=${join(folder, 'data')}`, folder, ...(options.args ?? [])],
    env,
  });
  await application.evaluate(() => (globalThis as unknown as { openWindows(): void }).openWindows());
  const page = await application.firstWindow();
  const complaints = complaintsOf(page);
  const close = async (): Promise<void> => {
    await application.close();
    rmSync(folder, { recursive: true, force: true, maxRetries: 10, retryDelay: 100 });
  };
  return { application, page, complaints, close };
}
