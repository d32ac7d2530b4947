// The Electron shell in a real window, with a page that holds only the bridge, and a stand-in engine: once as a Node
// process, once, in the main file as shipped, as a utility process.
import { copyFileSync, cpSync, existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { bundle } from '../../../scripts/bundle.ts';
import { buildBridgePage } from '../../support/bridge-page.ts';
import { openDisplay, type Display } from '../../support/display.ts';
import { openElectron, whyNoWindow, type Opened } from '../../support/electron.ts';

const obstacle = whyNoWindow();
let folder: string;
let display: Display;

beforeAll(async () => {
  if (obstacle !== null) return;
  folder = mkdtempSync(join(tmpdir(), 'holdfast-shell-'));
  const outDir = join(folder, 'main');
  const entries = {
    main: 'src-main/shells/electron/main.ts',
    preload: 'src-main/shells/electron/preload.ts',
    'main-smoke': 'tests/e2e/electron/main-smoke.ts',
  };
  for (const [name, entry] of Object.entries(entries)) {
    await bundle({ name, entry, format: 'cjs', outDir, target: 'node18' });
  }
  copyFileSync('tests/support/stand-in-engine.cjs', join(outDir, 'engine.cjs'));
  cpSync(await buildBridgePage('chrome114'), join(folder, 'renderer'), { recursive: true });
  display = await openDisplay();
});
afterAll(() => {
  display?.close();
  if (folder) rmSync(folder, { recursive: true });
});
beforeEach((context) => context.skip(obstacle !== null, obstacle ?? ''));

/** Requests that only the stand-in engine knows go through the same door. */
const ask = ({ page }: Opened, name: string, question: unknown) =>
  page.evaluate(([name, question]) => window.bridge.ask(name as 'engine about', question as never), [
    name,
    question,
  ] as const);

describe.each([
  ['its engine under Node', 'main-smoke.cjs'],
  ['its engine as a utility process, as shipped', 'main.cjs'],
])('a window with %s', (_how, main) => {
  let opened: Opened;
  let home: string;
  beforeAll(async () => {
    if (obstacle !== null) return;
    home = mkdtempSync(join(tmpdir(), 'holdfast-home-'));
    const ready = join(home, 'ready');
    opened = await openElectron({
      main: join(folder, 'main', main),
      display,
      home,
      env: { HOLDFAST_READY_FILE: ready },
    });
    await opened.page.waitForFunction(() => 'bridge' in window);
  });
  afterAll(async () => {
    await opened?.close();
    if (home) rmSync(home, { recursive: true });
  });

  test('tells the starter that it is there, and starts on the notebook in the home folder', async () => {
    await expect.poll(() => existsSync(join(home, 'ready'))).toBe(true);
    expect(await ask(opened, 'which notebook', {})).toEqual({ ok: true, value: join(home, 'Notebook.holdfast') });
  });

  test('carries arrays, bytes and NaN to the engine and back', async () => {
    const back = await opened.page.evaluate(async () => {
      const question = { trace: Float64Array.of(0.1, NaN), bytes: Uint8Array.of(0, 255), reach: NaN };
      const answer = await window.bridge.ask('echo' as 'engine about', question as never);
      if (!answer.ok) throw new Error('refused');
      const { trace, bytes, reach } = answer.value as unknown as typeof question;
      return [trace instanceof Float64Array, [...trace], bytes instanceof Uint8Array, [...bytes], reach];
    });
    expect(back).toEqual([true, [0.1, NaN], true, [0, 255], NaN]);
  });

  test('hears engine events, and of a restart', async () => {
    await ask(opened, 'say', { reason: 'test' });
    await opened.page.waitForFunction(() => window.events.length === 1);
    expect(await ask(opened, 'die', {})).toMatchObject({ ok: false, refusals: [{ code: 'engine-stopped' }] });
    await opened.page.waitForFunction(() => window.events.length === 2);
    expect(await opened.page.evaluate(() => window.events)).toMatchObject([
      { event: 'worker restarted' },
      { event: 'engine restarted' },
    ]);
    expect(await ask(opened, 'echo', 'back')).toEqual({ ok: true, value: 'back' });
  });

  test('keeps its page away from Node and Electron', async () => {
    const seen = await opened.page.evaluate(() => [
      typeof (globalThis as Record<string, unknown>)['require'],
      typeof (globalThis as Record<string, unknown>)['process'],
      Object.keys((window as unknown as { holdfast: object }).holdfast)
        .sort()
        .join(' '),
      location.origin,
    ]);
    const bridge = 'ask chooseNotebook listFolder onCommand onEvent shell';
    expect(seen).toEqual(['undefined', 'undefined', bridge, 'holdfast-app://window']);
  });

  test('opens no other window, follows no link, grants no permission', async () => {
    const { page, application } = opened;
    expect(await page.evaluate(() => window.open('https://example.org/') === null)).toBe(true);
    await page.evaluate(() => (location.href = 'https://example.org/'));
    expect(await page.evaluate(() => Notification.requestPermission())).toBe('denied');
    expect(await application.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows().length)).toBe(1);
    expect(page.url()).toBe('holdfast-app://window/');
  });

  test('answers under the strict policy, and nothing outside the page folder', async () => {
    const got = await opened.page.evaluate(async () => {
      const page = await fetch('/index.html');
      const other = await fetch('/..%2fmain%2fmain.cjs');
      return [page.status, page.headers.get('content-security-policy'), other.status];
    });
    expect(got).toEqual([200, expect.stringContaining("default-src 'none'"), 404]);
  });

  test('lets the page name only notebooks that the user chose', async () => {
    const { page, application } = opened;
    const path = join(home, 'chosen.holdfast');
    expect(await ask(opened, 'notebook open', { path })).toMatchObject({ refusals: [{ code: 'file-outside-folder' }] });
    await application.evaluate(({ dialog }, path) => {
      dialog.showOpenDialog = () => Promise.resolve({ canceled: false, filePaths: [path] });
      dialog.showSaveDialog = () => Promise.resolve({ canceled: false, filePath: path.replace('.holdfast', '-2') });
    }, path);
    expect(await page.evaluate(() => window.bridge.chooseNotebook('open', ''))).toBe(path);
    expect(await ask(opened, 'notebook open', { path })).toEqual({ ok: true, value: { path } });
    const fresh = join(home, 'chosen-2.holdfast');
    expect(await page.evaluate(() => window.bridge.chooseNotebook('save', 'x'))).toBe(fresh);
    expect(await ask(opened, 'notebook save as', { path: fresh })).toEqual({ ok: true, value: { path: fresh } });
  });

  test('sends menu commands to the page', async () => {
    await opened.application.evaluate(({ Menu }) => {
      const items = Menu.getApplicationMenu()?.items.flatMap((item) => item.submenu?.items ?? []) ?? [];
      for (const label of ['New notebook…', 'Undo', 'Rehearse', 'Keys'])
        items.find((item) => item.label === label)?.click();
    });
    await opened.page.waitForFunction(() => window.commands.length === 4);
    expect(await opened.page.evaluate(() => window.commands)).toEqual(['new notebook', 'undo', 'rehearse', 'keys']);
  });

  test('shows a notebook that is opened from outside', async () => {
    const path = join(home, 'outside.holdfast');
    writeFileSync(path, '');
    const reloaded = opened.page.waitForEvent('load');
    await opened.application.evaluate(
      ({ app }, path) => app.emit('second-instance', {}, ['holdfast', path], '/'),
      path,
    );
    await reloaded;
    await opened.page.waitForFunction(() => 'bridge' in window);
    await ask(opened, 'die', {});
    expect(await ask(opened, 'which notebook', {})).toEqual({ ok: true, value: path });
  });

  test('remembers its place', async () => {
    const bounds = { x: 40, y: 30, width: 1000, height: 700 };
    await opened.application.evaluate(
      ({ BrowserWindow }, to) => BrowserWindow.getAllWindows()[0]?.setBounds(to),
      bounds,
    );
    const data = await opened.application.evaluate(({ app }) => app.getPath('userData'));
    await opened.application.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows()[0]?.close());
    await expect.poll(() => existsSync(join(data, 'window.json'))).toBe(true);
    expect(JSON.parse(readFileSync(join(data, 'window.json'), 'utf8'))).toEqual({ bounds, maximized: false });
  });
});

test('a command line may name the notebook', async () => {
  const notebook = resolve(folder, 'named.holdfast');
  const opened = await openElectron({ main: join(folder, 'main/main-smoke.cjs'), display, args: [notebook] });
  await opened.page.waitForFunction(() => 'bridge' in window);
  expect(await ask(opened, 'which notebook', {})).toEqual({ ok: true, value: notebook });
  expect(opened.complaints).toEqual([]);
  await opened.close();
});
