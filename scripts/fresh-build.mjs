// Builds the page and the bundles where they are missing or older than their sources.
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { projectFolder } from './newer-node.mjs';

const sources = ['src-main', 'src-renderer', 'scripts/build.ts', 'vite.config.ts', 'package-lock.json'];
const bundles = ['main.cjs', 'preload.cjs', 'engine.cjs', 'worker.cjs'];
const outputs = {
  out: ['renderer/index.html', ...[...bundles, 'browser.mjs', 'cli.mjs'].map((name) => `main/${name}`)],
  'out-smoke': ['renderer/index.html', ...[...bundles, 'main-smoke.cjs'].map((name) => `main/${name}`)],
};

/** @param {'out' | 'out-smoke'} folder out-smoke: for the old runtime of the Electron tests. */
export function isStale(folder, project = projectFolder) {
  const made = outputs[folder].map((file) => join(project, folder, file));
  if (!made.every((file) => existsSync(file))) return true;
  const oldest = Math.min(...made.map((file) => statSync(file).mtimeMs));
  return sources.some((source) => newest(join(project, source)) > oldest);
}

function newest(path) {
  const { mtimeMs } = statSync(path);
  if (!statSync(path).isDirectory()) return mtimeMs;
  return readdirSync(path).reduce((latest, name) => Math.max(latest, newest(join(path, name))), mtimeMs);
}

/** @returns whether all is built; what went wrong then stands on the terminal. */
export function buildIfStale(folder) {
  if (!isStale(folder)) return true;
  const smoke = folder === 'out-smoke';
  console.log(smoke ? 'Building for the old runtime …' : 'Building …');
  const env = { ...process.env, ...(smoke ? { SMOKE: '1' } : {}) };
  const run = (...words) =>
    spawnSync(process.execPath, words, { cwd: projectFolder, env, stdio: ['ignore', 'ignore', 'inherit'] }).status ===
    0;
  return (
    run('node_modules/vite/bin/vite.js', 'build', '--logLevel', 'warn') &&
    run('scripts/build.ts', ...(smoke ? ['--smoke'] : []))
  );
}
