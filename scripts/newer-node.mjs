// Which Node this runs under, and a newer one where the machine's own is too old. Plain old JavaScript: it must run
// under the old one.
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const projectFolder = dirname(dirname(fileURLToPath(import.meta.url)));

/** Runs TypeScript as it is from 22.18 on. */
const oldest = [22, 18];

export function isNewEnough(version) {
  const [major, minor] = version.split('.').map(Number);
  return major > oldest[0] || (major === oldest[0] && minor >= oldest[1]);
}

/** Goes on only under a Node that is new enough: else starts the same script under the installed one, or says what to do. */
export function needNewerNode() {
  if (isNewEnough(process.versions.node)) return;
  const installed = join(projectFolder, 'node_modules/.bin/node');
  if (existsSync(installed)) {
    const { status } = spawnSync(installed, process.argv.slice(1), { stdio: 'inherit' });
    process.exit(status ?? 1);
  }
  const found = process.versions.node;
  console.error(`Holdfast needs Node ${oldest.join('.')} or later, and this is Node ${found}.`);
  console.error('On Linux run "npm ci" first, which brings one along; else install one from nodejs.org.');
  process.exit(1);
}
