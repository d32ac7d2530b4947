// Builds the page and the bundles where they are missing or older than their sources.
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** "out-smoke" is for the old runtime that the Electron tests use. */
export type OutFolder = 'out' | 'out-smoke';

const sources = [
  'src-main',
  'src-renderer',
  'scripts/build.ts',
  'scripts/bundle.ts',
  'vite.config.ts',
  'package-lock.json',
];
const inElectron = ['main/main.cjs', 'main/preload.cjs', 'main/engine.cjs', 'main/worker.cjs'];
const outputs: Readonly<Record<OutFolder, readonly string[]>> = {
  out: ['renderer/index.html', ...inElectron, 'main/browser.mjs', 'main/cli.mjs'],
  'out-smoke': ['renderer/index.html', ...inElectron, 'main/main-smoke.cjs'],
};
const projectFolder = dirname(import.meta.dirname);

export function isStale(folder: OutFolder, project = projectFolder): boolean {
  const made = outputs[folder].map((file) => join(project, folder, file));
  if (!made.every((file) => existsSync(file))) return true;
  const oldest = Math.min(...made.map((file) => statSync(file).mtimeMs));
  return sources.some((source) => newest(join(project, source)) > oldest);
}

/** A folder's own time counts, too: it changes when a file is taken out. */
function newest(path: string): number {
  const stat = statSync(path);
  if (!stat.isDirectory()) return stat.mtimeMs;
  return readdirSync(path).reduce((latest, name) => Math.max(latest, newest(join(path, name))), stat.mtimeMs);
}

/** @returns whether all is built; what went wrong then stands on the terminal. */
export function buildIfStale(folder: OutFolder): boolean {
  if (!isStale(folder)) return true;
  const smoke = folder === 'out-smoke';
  console.log(smoke ? 'Building for the old runtime …' : 'Building …');
  const env = { ...process.env, ...(smoke ? { SMOKE: '1' } : {}) };
  const run = (...words: string[]): boolean =>
    spawnSync(process.execPath, words, { cwd: projectFolder, env, stdio: ['ignore', 'ignore', 'inherit'] }).status ===
    0;
  return (
    run('node_modules/vite/bin/vite.js', 'build', '--logLevel', 'warn') &&
    run('scripts/build.ts', ...(smoke ? ['--smoke'] : []))
  );
}
