// One fault at a time: the notebook is whole after each, and says in words what happened.
import Database from 'better-sqlite3';
import { execFileSync } from 'node:child_process';
import { mkdirSync, readFileSync, readdirSync, truncateSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { describe, expect, it } from 'vitest';
import { keepCell } from '../../src-main/notebook/cells.ts';
import { createNotebook, openNotebook, type Notebook } from '../../src-main/notebook/open.ts';
import { notebookOverview } from '../../src-main/notebook/overview.ts';
import { createPlan } from '../../src-main/notebook/plans.ts';
import { readRehearsal, rehearsalsOfPlan, storeRehearsal } from '../../src-main/notebook/rehearsals.ts';
import { saveAs } from '../../src-main/notebook/save-as.ts';
import { readTraces } from '../../src-main/notebook/traces.ts';
import { written } from '../../src-main/engine/written.ts';
import { startProgram } from '../support/child.ts';
import { finishedRehearsal } from '../support/finished-rehearsal.ts';
import { testFolder } from '../support/folder.ts';
import { refusalsOf } from '../support/refusals.ts';
import { smallPlan } from '../support/small-plans.ts';

const at = testFolder();
const writer = new URL('programs/writer.ts', import.meta.url);

function notebookWithPlan(): { notebook: Notebook; planId: number } {
  const notebook = createNotebook(at('a.holdfast'));
  const plan = smallPlan();
  const cell = written(plan.cell);
  return { notebook, planId: createPlan(notebook, keepCell(notebook, cell), written(plan), cell) };
}

function expectWhole(notebook: Notebook): void {
  expect(notebook.db.pragma('integrity_check', { simple: true })).toBe('ok');
  expect(notebook.db.pragma('foreign_key_check')).toEqual([]);
}

describe('a program killed while it writes', () => {
  it('loses a transaction it was in the middle of, whole, and nothing else', async () => {
    notebookWithPlan().notebook.close();
    const child = startProgram(writer, [at('a.holdfast'), 'hold']);
    await child.says('inside');
    await child.kill();
    const notebook = openNotebook(at('a.holdfast'));
    expectWhole(notebook);
    expect(notebook.readOnlyReason).toBeNull();
    expect(notebookOverview(notebook).cells.map((cell) => cell.name)).toEqual(['Three balls']);
    notebook.close();
  });

  it('keeps every change it had finished', async () => {
    notebookWithPlan().notebook.close();
    const child = startProgram(writer, [at('a.holdfast'), 'commit']);
    await child.says('\n25\n');
    await child.kill();
    const said = child.said().trim().split('\n').length;
    const notebook = openNotebook(at('a.holdfast'));
    expectWhole(notebook);
    // One more than it could say may have been committed.
    const kept = notebookOverview(notebook).cells.length - 1;
    expect([said, said + 1]).toContain(kept);
    notebook.close();
  });

  it.skipIf(process.platform === 'win32')(
    'is whole when the disk takes no more bytes and the program ends',
    async () => {
      notebookWithPlan().notebook.close();
      // Blocks of 512 bytes or 1 kB: the log may not grow beyond some hundred kilobytes.
      const child = startProgram(writer, [at('a.holdfast'), 'commit'], 'ulimit -f 400; exec');
      await child.ended;
      const said = child.said().trim().split('\n').length;
      expect(said).toBeGreaterThan(3);
      const notebook = openNotebook(at('a.holdfast'));
      expectWhole(notebook);
      expect(notebookOverview(notebook).cells.length - 1).toBeGreaterThanOrEqual(said);
      notebook.close();
    },
  );

  it('gives the notebook free for writing', async () => {
    notebookWithPlan().notebook.close();
    const child = startProgram(writer, [at('a.holdfast'), 'stay']);
    await child.says('open');
    const second = openNotebook(at('a.holdfast'));
    expect(second.readOnlyReason).toContain(`process ${child.pid}`);
    expect(refusalsOf(() => keepCell(second, written(smallPlan().cell)))[0]?.code).toBe('notebook-read-only');
    second.close();
    await child.kill();
    const third = openNotebook(at('a.holdfast'));
    expect(third.readOnlyReason).toBeNull();
    third.close();
  });
});

describe('a write that fails', () => {
  it('leaves the notebook as it was, whichever page it is that finds no room', () => {
    const { notebook, planId } = notebookWithPlan();
    const pages = Number(notebook.db.pragma('page_count', { simple: true }));
    const before = notebookOverview(notebook);
    let failures = 0;
    for (let room = 0; ; room += 1) {
      notebook.db.pragma(`max_page_count = ${pages + room}`);
      try {
        storeRehearsal(notebook, finishedRehearsal(planId, 5000));
        break;
      } catch (error) {
        failures += 1;
        expect(error).toMatchObject({ data: { code: 'file-unwritable', value: 'on a full disk' } });
        expect(notebookOverview(notebook)).toEqual(before);
        expect(rehearsalsOfPlan(notebook, planId)).toEqual([]);
      }
    }
    // Two traces of 40 kB on pages of 4 kB take twenty pages: a failure at each.
    expect(failures).toBeGreaterThanOrEqual(20);
    expectWhole(notebook);
    expect(rehearsalsOfPlan(notebook, planId)).toHaveLength(1);
    notebook.close();
  });

  it('leaves no half file behind when saving as', () => {
    const { notebook } = notebookWithPlan();
    mkdirSync(at('taken'));
    expect(refusalsOf(() => saveAs(notebook, at('none/b.holdfast')))[0]?.code).toBe('file-unwritable');
    expect(refusalsOf(() => saveAs(notebook, at('taken')))[0]?.code).toBe('file-exists');
    expect(readdirSync(dirname(at('x'))).filter((name) => name.includes('.part'))).toEqual([]);
    notebook.close();
  });
});

describe('what a rehearsal is stored as', () => {
  it('comes back bit for bit: infinities, no-numbers, a negative zero, every sample', () => {
    const { notebook, planId } = notebookWithPlan();
    const done = finishedRehearsal(planId, 1001);
    const rehearsalId = storeRehearsal(notebook, done);
    expect(readRehearsal(notebook, rehearsalId).forecast).toEqual(done.forecast);
    expect(readTraces(notebook, rehearsalId)).toEqual(done.traces);
    expect(readTraces(notebook, rehearsalId, [1])).toEqual([]);
    notebook.close();
  });

  it('is not stored under a session of another cell', () => {
    const { notebook, planId } = notebookWithPlan();
    const stray = () => storeRehearsal(notebook, { ...finishedRehearsal(planId, 10), sessionId: 7 });
    expect(refusalsOf(stray)[0]?.code).toBe('notebook-record-missing');
    expect(rehearsalsOfPlan(notebook, planId)).toEqual([]);
    notebook.close();
  });
});

describe('a file that cannot be opened', () => {
  it.each(['cut to half', 'cut within the header', 'of a newer format', 'of another program', 'of text', 'empty'])(
    'is refused and left as it is: %s',
    (what) => {
      const path = at('a.holdfast');
      const code = spoil(path, what);
      const before = readFileSync(path);
      const beside = readdirSync(dirname(path));
      const [refusal] = refusalsOf(() => openNotebook(path));
      expect(refusal).toMatchObject({ code, place: path });
      expect(readFileSync(path).equals(before)).toBe(true);
      expect(readdirSync(dirname(path))).toEqual(beside);
    },
  );

  it('is refused when it is a folder, or is not there', () => {
    mkdirSync(at('folder.holdfast'));
    expect(refusalsOf(() => openNotebook(at('folder.holdfast')))[0]?.code).toBe('file-not-a-notebook');
    expect(refusalsOf(() => openNotebook(at('none.holdfast')))[0]?.code).toBe('file-not-found');
  });

  it.runIf(process.platform !== 'win32')('is refused at once when it is a pipe that nobody writes into', () => {
    execFileSync('mkfifo', [at('pipe.holdfast')]);
    expect(refusalsOf(() => openNotebook(at('pipe.holdfast')))[0]?.code).toBe('file-not-a-notebook');
  });

  /** Puts a spoilt file at `path` and gives the code it is to be refused with. */
  function spoil(path: string, what: string): string {
    if (what === 'of text' || what === 'empty') {
      writeFileSync(path, what === 'empty' ? '' : 'SQLite format 3, she wrote; and then nothing more. '.repeat(20));
      return 'file-not-a-notebook';
    }
    if (what === 'of another program') {
      const db = new Database(path);
      db.exec('CREATE TABLE recipe (name TEXT)');
      db.close();
      return 'file-not-a-notebook';
    }
    const { notebook } = notebookWithPlan();
    if (what === 'of a newer format') notebook.db.pragma('user_version = 99');
    notebook.close();
    if (what === 'of a newer format') return 'notebook-newer-than-app';
    const isShort = what === 'cut within the header';
    truncateSync(path, isShort ? 60 : Math.floor(readFileSync(path).length / 2));
    return isShort ? 'file-not-a-notebook' : 'file-unreadable';
  }
});
