// A page with nothing but the bridge on it, for tests of the shells that need no screens.
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { build } from 'vite';
import type { Bridge } from '../../src-main/contract/bridge.ts';

declare global {
  interface Window {
    bridge: Bridge;
    events: unknown[];
    commands: unknown[];
  }
}

/** Builds the page into a new folder and gives that. On it, `bridge` and the lists `events`, `commands` are global. */
export async function buildBridgePage(target = 'chrome140'): Promise<string> {
  const folder = mkdtempSync(join(tmpdir(), 'holdfast-page-'));
  const bridge = JSON.stringify(resolve('src-renderer/bridge.ts'));
  writeFileSync(
    join(folder, 'page.ts'),
    `import { bridge } from ${bridge};
     Object.assign(window, { bridge, events: [], commands: [] });
     bridge.onEvent((event) => window.events.push(event));
     bridge.onCommand((command) => window.commands.push(command));`,
  );
  writeFileSync(
    join(folder, 'index.html'),
    `<!doctype html><html lang="en"><head><title>Bridge</title><link rel="icon" href="data:," /></head>
     <body><h1>Bridge</h1><script type="module" src="./page.ts"></script></body></html>`,
  );
  const outDir = join(folder, 'built');
  await build({ root: folder, configFile: false, logLevel: 'warn', build: { outDir, target, modulePreload: false } });
  return outDir;
}
