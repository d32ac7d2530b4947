// npm start: builds what is missing, then opens the window; npm start -- NOTEBOOK opens that one.
import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { needNewerNode, projectFolder } from './newer-node.mjs';

const help = `npm start -- [--browser] [NOTEBOOK.holdfast]

  --browser  do not try Electron; use an installed browser of the Chromium family

Without a notebook the one in the program's own folder opens; HOLDFAST_HOME names another folder.`;

needNewerNode();
// TypeScript, which an old Node could not read.
const { startElectron } = await import('./electron-start.ts');
const { buildIfStale } = await import('./fresh-build.ts');
process.exitCode = await start(process.argv.slice(2));

async function start(args) {
  const notebooks = args.filter((word) => !word.startsWith('-'));
  const flags = args.filter((word) => word.startsWith('-'));
  if (flags.includes('--help')) {
    console.log(help);
    return 0;
  }
  if (notebooks.length > 1 || flags.some((flag) => flag !== '--browser')) {
    console.error(help);
    return 2;
  }
  if (!existsSync(join(projectFolder, 'node_modules/vite'))) {
    console.error('Run "npm ci" first.');
    return 1;
  }
  if (!buildIfStale('out')) {
    console.error('The program could not be built; what failed stands above.');
    return 1;
  }
  const notebook = notebooks[0] === undefined ? [] : [resolve(process.env.INIT_CWD ?? '.', notebooks[0])];

  if (!flags.includes('--browser')) {
    const started = await startElectron(notebook);
    if ('code' in started) return started.code;
    console.log(`Using a browser, not Electron: ${started.obstacle}.`);
  }
  const { runBrowserShell } = await import('../out/main/browser.mjs');
  await runBrowserShell(notebook[0]);
  return 0;
}
