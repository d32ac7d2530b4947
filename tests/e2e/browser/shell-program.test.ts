// The browser shell as a program of its own, bundled, with a page that holds only the bridge and a stand-in engine.
import { spawn, type ChildProcess } from 'node:child_process';
import {
  chmodSync,
  copyFileSync,
  cpSync,
  existsSync,
  mkdtempSync,
  readFileSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { bundle } from '../../../scripts/bundle.ts';
import { findBrowser } from '../../../src-main/shells/browser/find-browser.ts';
import { buildBridgePage } from '../../support/bridge-page.ts';
import { launchChromium } from '../../support/chromium.ts';
import { hasXvfb, openDisplay } from '../../support/display.ts';

let folder: string;
let program: ChildProcess | undefined;
let said: string;

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'holdfast-program-'));
  const outDir = join(folder, 'main');
  await bundle({ name: 'browser', entry: 'src-main/shells/browser/main.ts', format: 'es', outDir, target: 'node24' });
  copyFileSync('tests/support/stand-in-engine.cjs', join(outDir, 'engine.cjs'));
  cpSync(await buildBridgePage(), join(folder, 'renderer'), { recursive: true });
  writeFileSync(
    join(folder, 'start.mjs'),
    `import { runBrowserShell } from './main/browser.mjs'; await runBrowserShell(process.argv[2]);`,
  );
});
afterEach(() => void program?.kill('SIGKILL'));
afterAll(() => rmSync(folder, { recursive: true }));

function start(env: Record<string, string>): ChildProcess {
  said = '';
  const home = { DISPLAY: '', WAYLAND_DISPLAY: '', HOLDFAST_HOME: join(folder, 'home') };
  program = spawn(process.execPath, [join(folder, 'start.mjs')], { env: { ...process.env, ...home, ...env } });
  for (const stream of [program.stdout, program.stderr])
    stream?.on('data', (text: Buffer) => (said += text.toString()));
  return program;
}
const address = async (): Promise<string> => {
  await expect.poll(() => said, { timeout: 20_000 }).toContain('Ctrl+C');
  return /http:\/\/127\.0\.0\.1:\d+\/#\S+/.exec(said)?.[0] ?? '';
};

test('without a display it prints an address that lets one tab in, and ends when told to', async () => {
  const child = start({});
  const ended = new Promise((done) => child.once('exit', (code, signal) => done([code, signal])));
  const browser = await launchChromium();
  const page = await browser.newPage();
  await page.goto(await address());
  const notebook = page.evaluate(() => window.bridge.ask('which notebook' as 'engine about', {}));
  expect(await notebook).toEqual({ ok: true, value: join(folder, 'home/Notebook.holdfast') });
  await browser.close();
  child.kill('SIGTERM');
  expect(await ended).toEqual([0, null]);
});

test('with a display it opens a window, and no command line carries the code', async (context) => {
  context.skip(!hasXvfb(), 'no Xvfb to make a display');
  const display = await openDisplay();
  const browser = join(folder, 'browser');
  const words = join(folder, 'words');
  // The browser's own sandbox is off here only, because test machines run as root. Slow, so that the test can look.
  const script = `#!/bin/sh\nprintf '%s\\n' "$@" >${words}.part && mv ${words}.part ${words}\nsleep 2\n`;
  writeFileSync(browser, `${script}exec ${findBrowser() ?? ''} --no-sandbox --disable-gpu "$@"\n`);
  chmodSync(browser, 0o755);
  const child = start({ DISPLAY: display.name ?? '', CHROMIUM: browser });
  const ended = new Promise((done) => child.once('exit', (code, signal) => done([code, signal])));

  await address();
  await expect.poll(() => existsSync(words), { timeout: 20_000 }).toBe(true);
  const line = readFileSync(words, 'utf8');
  const page = fileURLToPath(/--app=(\S+)/.exec(line)?.[1] ?? '');
  expect(statSync(page).mode & 0o777).toBe(0o600);
  const code = /#([\w-]{20,})/.exec(readFileSync(page, 'utf8'))?.[1];
  expect(code).toBeDefined();
  expect(line).not.toContain(code);
  expect(said).not.toContain(code);
  // Used, and then gone.
  await expect.poll(() => existsSync(page), { timeout: 40_000 }).toBe(false);

  child.kill('SIGTERM');
  expect(await ended).toEqual([0, null]);
  expect(existsSync(dirname(page))).toBe(false);
  display.close();
});
