// Starts the Electron window where it can run, and knows why where it cannot.
import { spawn, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { projectFolder } from './newer-node.mjs';

const download_ms = 180_000;
const window_ms = 20_000;

const isSet = (value) => value !== undefined && value !== '';

/** Why no Electron window can open on this machine; null where one might. */
export function electronObstacle(env = process.env, platform = process.platform, user = process.getuid?.()) {
  if (platform !== 'linux') return null;
  if (!isSet(env.DISPLAY) && !isSet(env.WAYLAND_DISPLAY)) return 'there is no display';
  // Chromium refuses to run as root unless its sandbox is switched off, which would be the wrong way out.
  if (user === 0) return 'Electron does not run as root';
  return null;
}

/** The runtime's program, fetched where it is missing; null where that fails or takes too long. */
function electronProgram() {
  const folder = join(projectFolder, 'node_modules/electron');
  const named = process.env.ELECTRON_OVERRIDE_DIST_PATH;
  if (isSet(named)) return join(named, 'electron');
  const installed = () => {
    const pathFile = join(folder, 'path.txt');
    if (!existsSync(pathFile)) return null;
    const program = join(folder, 'dist', readFileSync(pathFile, 'utf8'));
    return existsSync(program) ? program : null;
  };
  if (installed() === null && existsSync(join(folder, 'install.js'))) {
    console.log('Fetching Electron, once (about 100 MB) …');
    spawnSync(process.execPath, [join(folder, 'install.js')], { stdio: 'ignore', timeout: download_ms });
  }
  return installed();
}

/**
 * Opens the window and settles when it has closed.
 * @returns {Promise<{ code: number } | { obstacle: string }>} an obstacle when no window appeared.
 */
export async function startElectron(args) {
  const obstacle = electronObstacle();
  if (obstacle) return { obstacle };
  const program = electronProgram();
  if (!program) return { obstacle: 'Electron could not be fetched' };

  const folder = mkdtempSync(join(tmpdir(), 'holdfast-start-'));
  const ready = join(folder, 'ready');
  const child = spawn(program, [projectFolder, ...args], {
    stdio: 'inherit',
    env: { ...process.env, HOLDFAST_READY_FILE: ready },
  });
  const ended = new Promise((resolve) => {
    child.once('error', (cause) => resolve(cause.message));
    child.once('exit', (code, signal) => resolve(code ?? signal));
  });
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => child.kill(signal));
  try {
    const opened = await Promise.race([ended.then(() => 'ended'), fileAppears(ready, window_ms)]);
    // A window may open and close faster than this looks.
    if (opened === 'appeared' || existsSync(ready)) {
      const how = await ended;
      return { code: typeof how === 'number' ? how : 1 };
    }
    if (opened === 'ended') return { obstacle: `Electron ended at once (${await ended})` };
    child.kill('SIGKILL');
    return { obstacle: `Electron opened no window within ${window_ms / 1000} s` };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

async function fileAppears(file, most_ms) {
  const end = Date.now() + most_ms;
  while (Date.now() < end) {
    if (existsSync(file)) return 'appeared';
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  return 'late';
}
