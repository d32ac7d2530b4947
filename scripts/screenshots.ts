// Remakes the README's pictures from the running app: npm run screenshots [-- --all FOLDER]
// Without --all: the light theme at 1280×800 into docs/screens. With it: every area in both themes and sizes, to look at.
import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { chromium, type Page } from 'playwright-core';
import { findBrowser } from '../src-main/shells/browser/find-browser.ts';
import { serve } from '../src-main/shells/browser/server.ts';
import { EngineClient } from '../src-main/shells/engine-client.ts';
import { startWithNode } from '../src-main/shells/start-with-node.ts';

const areas = ['Cell', 'Rig', 'Protocol', 'Rehearse', 'Forecast'];
const small = { width: 1280, height: 800 };
const large = { width: 1920, height: 1080 };

const project = join(import.meta.dirname, '..');
const allAt = process.argv.indexOf('--all');
const folder = resolve(allAt > 0 ? (process.argv[allAt + 1] ?? 'test-results/screens') : join(project, 'docs/screens'));
const views =
  allAt > 0
    ? [small, large].flatMap((size) => ['light', 'dark'].map((theme) => ({ size, theme })))
    : [{ size: small, theme: 'light' }];

const executablePath = findBrowser();
if (!executablePath) throw new Error('no Chromium: install one, or let CHROMIUM name one');
execFileSync(process.execPath, [join(project, 'node_modules/vite/bin/vite.js'), 'build', '--logLevel', 'error'], {
  cwd: project,
  stdio: 'inherit',
});

const home = mkdtempSync(join(tmpdir(), 'holdfast-screens-'));
const client = new EngineClient(
  startWithNode(join(project, 'src-main/engine/process.ts')),
  join(home, 'Example.holdfast'),
);
const served = await serve({ pages: join(project, 'out/renderer'), client, startFolder: home });
// As root the browser's own sandbox cannot start; the page is ours.
const browser = await chromium.launch({
  executablePath,
  chromiumSandbox: process.getuid?.() !== 0,
  args: ['--disable-gpu', '--disable-quic'],
});
mkdirSync(folder, { recursive: true });
try {
  for (const { size, theme } of views) {
    const page = await browser.newPage({ viewport: size, colorScheme: theme === 'dark' ? 'dark' : 'light' });
    await page.goto(served.newAddress());
    await page.getByRole('tab', { name: 'Cell' }).waitFor();
    await settled(page);
    for (const area of areas) {
      await page.getByRole('tab', { name: area, exact: true }).click();
      await settled(page);
      const view = allAt > 0 ? `-${theme}-${size.width}` : '';
      await page.screenshot({ path: join(folder, `${area.toLowerCase()}${view}.png`) });
      console.log(`${area.toLowerCase()}${view}.png`);
    }
    await page.close();
  }
} finally {
  await browser.close();
  await served.close();
  await client.stop();
  rmSync(home, { recursive: true, force: true });
}

/** Drawings and charts paint in the frame after their data; a second is ample. */
async function settled(page: Page): Promise<void> {
  await page.waitForLoadState('networkidle', { timeout: 2000 }).catch(() => undefined);
  await page.waitForTimeout(1200);
}
