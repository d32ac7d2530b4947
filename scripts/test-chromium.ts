// Sees to it that there is a browser of the Chromium family for the tests in real windows.
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { findBrowser } from '../src-main/shells/browser/find-browser.ts';

const remedy = 'Install Chromium (on Debian: apt-get install chromium), or let CHROMIUM name the program of one.';

/** @returns null when there is one, else what to do. */
export function chromiumObstacle(): string | null {
  const named = process.env['CHROMIUM'];
  if (named) return existsSync(named) ? null : `CHROMIUM names ${named}, which does not exist. ${remedy}`;
  if (findBrowser()) return null;
  if (process.getuid?.() !== 0 || !existsSync('/usr/bin/apt-get'))
    return `No browser of the Chromium family. ${remedy}`;
  console.log('Installing chromium …');
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const apt = (...words: string[]): boolean =>
    spawnSync('apt-get', words, { env, stdio: ['ignore', 'ignore', 'inherit'] }).status === 0;
  const installed = apt('update', '-q') && apt('install', '-y', '-q', '--no-install-recommends', 'chromium');
  return installed && findBrowser() ? null : `chromium could not be installed. ${remedy}`;
}
