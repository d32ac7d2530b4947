import { mkdirSync, mkdtempSync, realpathSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { withRealPaths } from '../../src-main/shells/browser/notebook-paths.ts';
import { StartFolder } from '../../src-main/shells/browser/start-folder.ts';

let outside: string;
let start: string;
let folder: StartFolder;
beforeEach(() => {
  outside = realpathSync(mkdtempSync(join(tmpdir(), 'holdfast-folder-')));
  start = join(outside, 'start');
  mkdirSync(join(start, 'cells'), { recursive: true });
  mkdirSync(join(outside, 'start-not'));
  for (const file of ['secret.holdfast', 'start-not/b.holdfast', 'start/a.holdfast', 'start/a.txt']) {
    writeFileSync(join(outside, file), '');
  }
  symlinkSync(outside, join(start, 'way-out'));
  symlinkSync(join(outside, 'secret.holdfast'), join(start, 'link.holdfast'));
  symlinkSync(join(outside, 'nowhere'), join(start, 'dangling.holdfast'));
  symlinkSync('cells', join(start, 'inner'));
  folder = new StartFolder(start);
});
afterEach(() => rmSync(outside, { recursive: true }));

const refused = (code: string) => ({ ok: false, refusals: [expect.objectContaining({ code })] });

describe('the start folder of the browser shell', () => {
  it.each([
    '../secret.holdfast',
    '../start-not/b.holdfast',
    'way-out/secret.holdfast',
    'link.holdfast',
    'dangling.holdfast',
    '/etc/passwd',
    'cells/../../secret.holdfast',
    'a\0.holdfast',
  ])('lets nobody open %j', (path) => {
    expect(folder.existing(path)).toEqual(refused('file-outside-folder'));
  });

  it.each(['../new.holdfast', 'way-out/new.holdfast', '/tmp/new.holdfast', 'way-out/deeper/new.holdfast'])(
    'lets nobody make %j',
    (path) => {
      expect(folder.fresh(path)).toEqual(refused('file-outside-folder'));
    },
  );

  it.each(['a.holdfast', 'a', 'link.holdfast', 'dangling.holdfast'])('never overwrites %j', (path) => {
    expect(folder.fresh(path)).toEqual(refused('file-exists'));
  });

  it('opens notebooks below it, by a relative or an absolute path', () => {
    const value = join(start, 'a.holdfast');
    expect(folder.existing('a.holdfast')).toEqual({ ok: true, value });
    expect(folder.existing(value)).toEqual({ ok: true, value });
    expect(folder.existing('a.txt')).toEqual(refused('file-not-a-notebook'));
    expect(folder.existing('b.holdfast')).toEqual(refused('file-not-found'));
  });

  it('makes notebooks below it, links inside it included', () => {
    expect(folder.fresh('inner/b')).toEqual({ ok: true, value: join(start, 'cells/b.holdfast') });
    expect(folder.fresh('nowhere/b')).toEqual(refused('file-not-found'));
  });

  it('lists folders and notebooks only', () => {
    expect(folder.list('')).toEqual({ ok: true, value: { folder: '', folders: ['cells'], files: ['a.holdfast'] } });
    expect(folder.list('cells')).toEqual({ ok: true, value: { folder: 'cells', folders: [], files: [] } });
    expect(folder.list('..')).toEqual(refused('file-outside-folder'));
    expect(folder.list('way-out')).toEqual(refused('file-outside-folder'));
    expect(folder.list('nowhere')).toEqual(refused('file-unreadable'));
  });

  it('stands before every request that names a notebook, and before no other', () => {
    for (const name of ['notebook open', 'notebook create', 'notebook save as']) {
      expect(withRealPaths(folder, name, { path: '../x.holdfast' })).toEqual(refused('file-outside-folder'));
    }
    expect(withRealPaths(folder, 'notebook create', { path: 'n' })).toEqual({
      ok: true,
      value: { path: join(start, 'n.holdfast') },
    });
    for (const question of [{ path: 7 }, {}, null, 'x']) {
      expect(withRealPaths(folder, 'notebook open', question)).toEqual({ ok: true, value: question });
    }
  });
});
