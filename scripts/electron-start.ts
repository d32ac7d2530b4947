// Opens the Electron window where it can run, and knows why where it cannot.
import { spawn, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { hasDisplay } from '../src-main/shells/browser/find-browser.ts';

/** What came of it: the code the window's process ended with, or why there was no window. */
export type Started = { readonly code: number } | { readonly obstacle: string };

const download_ms = 180_000;
const window_ms = 20_000;
const projectFolder = dirname(import.meta.dirname);

/** Opens the window and settles when it has closed. */
export async function startElectron(args: readonly string[]): Promise<Started> {
  const obstacle = electronObstacle();
  if (obstacle !== null) return { obstacle };
  const program = electronProgram();
  if (program === null) return { obstacle: 'Electron could not be fetched' };
  return openWindow(program, [projectFolder, ...args], window_ms);
}

/** Why no Electron window can open on this machine; null where one might. */
export function electronObstacle(
  env: Readonly<Record<string, string | undefined>> = process.env,
  platform = process.platform,
  user = process.getuid?.(),
): string | null {
  if (!hasDisplay(env, platform)) return 'there is no display';
  // Chromium refuses to run as root unless its sandbox is switched off, which would be the wrong way out.
  if (platform === 'linux' && user === 0) return 'Electron does not run as root';
  return null;
}

/** The runtime's program, fetched where it is missing; null where that fails or takes too long. */
function electronProgram(): string | null {
  const named = process.env['ELECTRON_OVERRIDE_DIST_PATH'];
  if (named) return join(named, 'electron');
  const folder = join(projectFolder, 'node_modules/electron');
  const fetcher = join(folder, 'install.js');
  if (installedIn(folder) === null && existsSync(fetcher)) {
    console.log('Fetching Electron, once (about 100 MB) …');
    spawnSync(process.execPath, [fetcher], { stdio: 'ignore', timeout: download_ms });
  }
  return installedIn(folder);
}

function installedIn(folder: string): string | null {
  const pathFile = join(folder, 'path.txt');
  if (!existsSync(pathFile)) return null;
  const program = join(folder, 'dist', readFileSync(pathFile, 'utf8'));
  return existsSync(program) ? program : null;
}

/** Runs a program that writes the file HOLDFAST_READY_FILE once its window shows. */
export async function openWindow(program: string, args: readonly string[], within_ms: number): Promise<Started> {
  const folder = mkdtempSync(join(tmpdir(), 'holdfast-start-'));
  const ready = join(folder, 'ready');
  const child = spawn(program, args, { stdio: 'inherit', env: { ...process.env, HOLDFAST_READY_FILE: ready } });
  const ended = new Promise<number | string>((resolve) => {
    child.once('error', (cause) => resolve(cause.message));
    child.once('exit', (code, signal) => resolve(code ?? String(signal)));
  });
  const passOn = (signal: NodeJS.Signals): void => void child.kill(signal);
  const signals = ['SIGINT', 'SIGTERM', 'SIGHUP'] as const;
  for (const signal of signals) process.on(signal, passOn);
  try {
    const first = await Promise.race([ended.then(() => 'ended' as const), appeared(ready, within_ms)]);
    // A window may have opened and closed between two looks.
    if (existsSync(ready)) {
      const how = await ended;
      return { code: typeof how === 'number' ? how : 1 };
    }
    if (first === 'ended') return { obstacle: `Electron ended at once (${await ended})` };
    child.kill('SIGKILL');
    return { obstacle: `Electron opened no window within ${within_ms / 1000} s` };
  } finally {
    for (const signal of signals) process.off(signal, passOn);
    rmSync(folder, { recursive: true, force: true });
  }
}

async function appeared(file: string, within_ms: number): Promise<'appeared' | 'late'> {
  for (const end = Date.now() + within_ms; Date.now() < end;) {
    if (existsSync(file)) return 'appeared';
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  return 'late';
}
