import { spawnSync } from 'node:child_process';
import { chmodSync, cpSync, mkdirSync, mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { electronObstacle, openWindow } from '../../scripts/electron-start.ts';
import { isStale } from '../../scripts/fresh-build.ts';
import { findBrowser, hasDisplay } from '../../src-main/shells/browser/find-browser.ts';
import { notebookNamed } from '../../src-main/shells/electron/starting-notebook.ts';
import { readWindowState, writeWindowState } from '../../src-main/shells/electron/window-state.ts';
import { homeFolder } from '../../src-main/shells/home.ts';

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'holdfast-start-'));
});
afterEach(() => rmSync(folder, { recursive: true }));

describe('npm start', () => {
  /** Under a Node that says it is an old one. */
  const oldNode = (script: string, args: string[] = []) => {
    const pretend = `data:text/javascript,if (process.env.PRETEND !== 'over') {
      process.env.PRETEND = 'over'; Object.defineProperty(process.versions, 'node', { value: '20.20.2' }); }`;
    return spawnSync(process.execPath, ['--import', pretend, script, ...args], { encoding: 'utf8' });
  };

  it('says what to do under a Node that is too old', () => {
    cpSync('scripts', join(folder, 'scripts'), { recursive: true });
    const { status, stderr } = oldNode(join(folder, 'scripts/start.mjs'));
    expect(status).toBe(1);
    expect(stderr).toContain('needs Node 22.18 or later, and this is Node 20.20.2');
    expect(stderr).toContain('npm ci');
  });

  it('shows its help, and refuses options it does not know', () => {
    const start = (...args: string[]) =>
      spawnSync(process.execPath, ['scripts/start.mjs', ...args], { encoding: 'utf8' });
    expect(start('--help')).toMatchObject({ status: 0, stdout: expect.stringContaining('--browser') as string });
    expect(start('--bowser')).toMatchObject({ status: 2, stderr: expect.stringContaining('--browser') as string });
    expect(start('a.holdfast', 'b.holdfast').status).toBe(2);
  });

  it.each<[string, Record<string, string>, NodeJS.Platform, number | undefined, string | null]>([
    ['no display', {}, 'linux', 1000, 'there is no display'],
    ['an empty name of a display', { DISPLAY: '' }, 'linux', 1000, 'there is no display'],
    ['root', { DISPLAY: ':0' }, 'linux', 0, 'Electron does not run as root'],
    ['a display', { DISPLAY: ':0' }, 'linux', 1000, null],
    ['Wayland', { DISPLAY: '', WAYLAND_DISPLAY: 'wayland-0' }, 'linux', 1000, null],
    ['macOS', {}, 'darwin', 501, null],
    ['Windows', {}, 'win32', undefined, null],
  ])('with %s knows whether Electron can open a window', (_what, env, platform, user, obstacle) => {
    expect(electronObstacle(env, platform, user)).toBe(obstacle);
  });

  // Programs that stand for Electron; a shell script is enough.
  const program = (lines: string): string => {
    const file = join(folder, 'program');
    writeFileSync(file, `#!/bin/sh\n${lines}\n`);
    chmodSync(file, 0o755);
    return file;
  };

  it('stays with a window that appeared, and passes its end on', async () => {
    const file = program('touch "$HOLDFAST_READY_FILE"; sleep 0.3; exit 7');
    expect(await openWindow(file, [], 20_000)).toEqual({ code: 7 });
  });

  it('says that Electron ended early', async () => {
    expect(await openWindow(program('exit 3'), [], 20_000)).toEqual({ obstacle: 'Electron ended at once (3)' });
    expect(await openWindow(join(folder, 'none'), [], 20_000)).toEqual({
      obstacle: expect.stringContaining('ENOENT') as string,
    });
  });

  it('gives up on a window that does not appear, and ends its program', async () => {
    const file = program(`exec sleep 1000`);
    expect(await openWindow(file, [], 400)).toEqual({ obstacle: 'Electron opened no window within 0.4 s' });
  });
});

describe('a build', () => {
  const all = [
    ...['renderer/index.html', 'main/main.cjs', 'main/preload.cjs', 'main/engine.cjs', 'main/worker.cjs'],
    ...['main/browser.mjs', 'main/cli.mjs'],
  ];
  const write = (file: string, time_s: number): void => {
    mkdirSync(dirname(join(folder, file)), { recursive: true });
    writeFileSync(join(folder, file), '');
    utimesSync(join(folder, file), time_s, time_s);
  };
  beforeEach(() => {
    const files = ['src-main/units/si.ts', 'src-renderer/App.svelte', 'scripts/build.ts', 'scripts/bundle.ts'];
    for (const file of [...files, 'vite.config.ts', 'package-lock.json']) write(file, 1000);
    for (const name of ['src-main', 'src-main/units', 'src-renderer']) utimesSync(join(folder, name), 1000, 1000);
    for (const file of all) write(`out/${file}`, 2000);
  });

  it('is fresh when every output is younger than every source', () => {
    expect(isStale('out', folder)).toBe(false);
  });

  it.each(all)('is stale without %s', (file) => {
    rmSync(join(folder, 'out', file));
    expect(isStale('out', folder)).toBe(true);
  });

  it.each(['src-main/units/si.ts', 'src-renderer/App.svelte', 'package-lock.json'])(
    'is stale when %s is younger',
    (file) => {
      write(file, 3000);
      expect(isStale('out', folder)).toBe(true);
    },
  );

  it('is stale when a source was taken out', () => {
    rmSync(join(folder, 'src-main/units/si.ts'));
    expect(isStale('out', folder)).toBe(true);
  });
});

describe('where things are', () => {
  it.each<[NodeJS.Platform, Record<string, string>, string]>([
    ['linux', {}, '/home/u/.local/share/holdfast'],
    ['linux', { XDG_DATA_HOME: '/data' }, '/data/holdfast'],
    ['linux', { XDG_DATA_HOME: 'relative' }, '/home/u/.local/share/holdfast'],
    ['darwin', {}, '/home/u/Library/Application Support/Holdfast'],
    ['linux', { HOLDFAST_HOME: '/elsewhere' }, '/elsewhere'],
  ])('on %s with %j the home folder is %s', (platform, env, home) => {
    expect(homeFolder(env, platform, '/home/u')).toBe(home);
  });

  it('a browser is found on the path, or where CHROMIUM says', () => {
    writeFileSync(join(folder, 'google-chrome'), '');
    chmodSync(join(folder, 'google-chrome'), 0o755);
    expect(findBrowser({ PATH: `/nowhere:${folder}` }, 'linux')).toBe(join(folder, 'google-chrome'));
    expect(findBrowser({ PATH: '/nowhere', CHROMIUM: '/opt/c' }, 'linux')).toBe('/opt/c');
    expect(findBrowser({ PATH: '/nowhere' }, 'linux')).toBeNull();
    expect(hasDisplay({}, 'linux')).toBe(false);
  });

  it('a notebook is named by its ending, relative to where the user stands', () => {
    expect(notebookNamed(['electron', '--flag', '/app', 'a.holdfast'], '/w')).toBe('/w/a.holdfast');
    expect(notebookNamed(['electron', '.'], '/w')).toBeNull();
  });

  const screens = [{ x: 0, y: 0, width: 1920, height: 1080 }];
  it.each<[string, string | null, boolean]>([
    ['a place on the screen', '{"bounds":{"x":10,"y":20,"width":1000,"height":700},"maximized":true}', true],
    ['a screen that is gone', '{"bounds":{"x":2500,"y":20,"width":1000,"height":700},"maximized":false}', false],
    ['a title bar above the screen', '{"bounds":{"x":10,"y":-50,"width":1000,"height":700},"maximized":false}', false],
    ['a size of nothing', '{"bounds":{"x":10,"y":20,"width":0,"height":0},"maximized":false}', false],
    ['half a file', '{"bounds":{"x":10', false],
    ['no file', null, false],
  ])('a window with %s is put back: %s', (_what, text, isKept) => {
    const file = join(folder, 'window.json');
    if (text !== null) writeFileSync(file, text);
    expect(readWindowState(file, screens)).toEqual(isKept ? JSON.parse(text ?? '') : null);
  });

  it('a window state is read as it was written', () => {
    const state = { bounds: { x: 1, y: 2, width: 900, height: 600 }, maximized: false };
    writeWindowState(join(folder, 'window.json'), state);
    expect(readWindowState(join(folder, 'window.json'), screens)).toEqual(state);
  });
});
