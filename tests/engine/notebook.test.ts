// The notebook by itself: what is kept, what never changes, who may write.
import Database from 'better-sqlite3';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { keepCell, readCell, removeCell } from '../../src-main/notebook/cells.ts';
import { change, createNotebook, openNotebook } from '../../src-main/notebook/open.ts';
import { notebookOverview } from '../../src-main/notebook/overview.ts';
import { createPlan, keepDraft, keepNamed, readPlan, removePlan } from '../../src-main/notebook/plans.ts';
import { saveAs } from '../../src-main/notebook/save-as.ts';
import { searchNotebook } from '../../src-main/notebook/search.ts';
import { createSession, readSession, writeSession } from '../../src-main/notebook/sessions.ts';
import { keepVersion } from '../../src-main/notebook/versions.ts';
import { hashOf } from '../../src-main/notebook/written.ts';
import { written } from '../../src-main/engine/written.ts';
import { testFolder } from '../support/folder.ts';
import { refusalsOf } from '../support/refusals.ts';
import { smallPlan } from '../support/small-plans.ts';

const at = testFolder();
const plan = smallPlan();
const cell = written(plan.cell);

describe('notebook file', () => {
  it('is a SQLite file marked as a notebook, with full synchronisation and foreign keys', () => {
    const notebook = createNotebook(at('a.holdfast'));
    const pragma = (name: string) => notebook.db.pragma(name, { simple: true });
    expect(pragma('application_id')).toBe(0x486f6c64);
    expect(pragma('user_version')).toBe(1);
    expect(pragma('journal_mode')).toBe('wal');
    expect(pragma('synchronous')).toBe(2); // FULL
    expect(pragma('foreign_keys')).toBe(1);
    const loose = notebook.db.prepare(
      "SELECT name FROM pragma_table_list WHERE strict = 0 AND name NOT LIKE 'sqlite%'",
    );
    expect(loose.all()).toEqual([]);
    notebook.close();
  });

  it('leaves nothing beside itself after closing', () => {
    createNotebook(at('a.holdfast')).close();
    expect(['-wal', '-shm', '-lock'].filter((ending) => existsSync(at(`a.holdfast${ending}`)))).toEqual([]);
  });

  it('never overwrites a file, neither on making nor on saving as', () => {
    writeFileSync(at('letter.txt'), 'dear reader');
    const notebook = createNotebook(at('a.holdfast'));
    expect(refusalsOf(() => createNotebook(at('letter.txt')))[0]?.code).toBe('file-exists');
    expect(refusalsOf(() => saveAs(notebook, at('letter.txt')))[0]?.code).toBe('file-exists');
    expect(readFileSync(at('letter.txt'), 'utf8')).toBe('dear reader');
    notebook.close();
  });

  it('saves as a whole copy and leaves the first as it was', () => {
    const first = createNotebook(at('a.holdfast'));
    const cellId = keepCell(first, cell);
    const second = saveAs(first, at('b.holdfast'));
    removeCell(second, cellId, true);
    expect(readCell(second, cellId)).toEqual(plan.cell);
    expect(notebookOverview(first).cells).toHaveLength(1);
    expect(notebookOverview(second).cells).toHaveLength(0);
    first.close();
    second.close();
  });

  it('is for reading only while another has it, says who, and is free again after', () => {
    const first = createNotebook(at('a.holdfast'));
    const second = openNotebook(at('a.holdfast'));
    expect(second.readOnlyReason).toContain(`process ${process.pid}`);
    keepCell(first, cell);
    expect(notebookOverview(second).cells).toHaveLength(1);
    const [refusal] = refusalsOf(() => keepCell(second, cell));
    expect(refusal?.code).toBe('notebook-read-only');
    first.close();
    second.close();
    const third = openNotebook(at('a.holdfast'));
    expect(third.readOnlyReason).toBeNull();
    third.close();
  });
});

describe('versions', () => {
  it('are kept once per document under the SHA-256 of its canonical JSON', () => {
    const notebook = createNotebook(at('a.holdfast'));
    const ids = change(notebook, (now) => [keepVersion(notebook, cell, now), keepVersion(notebook, cell, now)]);
    expect(new Set(ids).size).toBe(1);
    const row = notebook.db.prepare<[], { hash: string; document: string }>('SELECT hash, document FROM version').get();
    expect(row).toEqual({ hash: hashOf(cell.text), document: cell.text });
    notebook.close();
  });

  it.each(['UPDATE version SET name = 1', 'DELETE FROM version'])('refuse to be changed: %s', (sql) => {
    const notebook = createNotebook(at('a.holdfast'));
    change(notebook, (now) => keepVersion(notebook, cell, now));
    expect(() => notebook.db.exec(sql)).toThrow(Database.SqliteError);
    notebook.close();
  });
});

describe('cells, plans and sessions', () => {
  it('keep a plan as edited, and its cell with it', () => {
    const notebook = createNotebook(at('a.holdfast'));
    const cellId = keepCell(notebook, cell);
    const planId = createPlan(notebook, cellId, written(plan), cell);
    const edited = { ...plan, name: 'Edited', cell: { ...plan.cell, note: 'warmer' } };
    const savedAt = keepDraft(notebook, planId, written(edited), written(edited.cell));
    expect(readPlan(notebook, planId)).toEqual({ planId, cellId, plan: edited, savedAt });
    expect(readCell(notebook, cellId).note).toBe('warmer');
    notebook.close();
  });

  it('do not bring an old state of a cell back when another of its plans is saved', () => {
    const notebook = createNotebook(at('a.holdfast'));
    const cellId = keepCell(notebook, cell);
    const one = createPlan(notebook, cellId, written(plan), cell);
    const two = createPlan(notebook, cellId, written(plan), cell);
    const warmer = { ...plan, cell: { ...plan.cell, note: 'warmer' } };
    keepDraft(notebook, one, written(warmer), written(warmer.cell));
    keepDraft(notebook, two, written({ ...plan, note: 'other' }), cell);
    expect(readCell(notebook, cellId).note).toBe('warmer');
    notebook.close();
  });

  it('do not double a cell kept twice', () => {
    const notebook = createNotebook(at('a.holdfast'));
    expect(keepCell(notebook, cell)).toBe(keepCell(notebook, cell));
    notebook.close();
  });

  it('make an immutable version on naming', () => {
    const notebook = createNotebook(at('a.holdfast'));
    const planId = createPlan(notebook, keepCell(notebook, cell), written(plan), cell);
    const named = { ...plan, name: 'For Tuesday' };
    keepNamed(notebook, planId, written(named), cell);
    const row = notebook.db.prepare("SELECT name FROM version WHERE kind = 'plan'").get();
    expect(row).toEqual({ name: 'For Tuesday' });
    notebook.close();
  });

  it('hide what is removed and bring it back', () => {
    const notebook = createNotebook(at('a.holdfast'));
    const planId = createPlan(notebook, keepCell(notebook, cell), written(plan), cell);
    const plans = () => notebookOverview(notebook).cells[0]?.plans.map((each) => each.planId);
    removePlan(notebook, planId, true);
    expect(plans()).toEqual([]);
    expect(notebookOverview(notebook).openPlanId).toBeNull();
    removePlan(notebook, planId, false);
    expect(plans()).toEqual([planId]);
    notebook.close();
  });

  it('keep a session with its notes', () => {
    const notebook = createNotebook(at('a.holdfast'));
    const cellId = keepCell(notebook, cell);
    const sessionId = createSession(notebook, cellId, '2026-03-14', '');
    writeSession(notebook, sessionId, 'Slice 2', 'seal lost at 11:40');
    expect(readSession(notebook, sessionId)).toEqual({
      sessionId,
      cellId,
      date: '2026-03-14',
      title: 'Slice 2',
      notes: 'seal lost at 11:40',
      rehearsals: [],
    });
    notebook.close();
  });

  it.each([
    ['cell', (n: ReturnType<typeof openNotebook>) => readCell(n, 99)],
    ['plan', (n: ReturnType<typeof openNotebook>) => readPlan(n, 99)],
    ['session', (n: ReturnType<typeof openNotebook>) => readSession(n, 99)],
    ['owner', (n: ReturnType<typeof openNotebook>) => createPlan(n, 99, written(plan), cell)],
  ])('say which %s is missing', (_, work) => {
    const notebook = createNotebook(at('a.holdfast'));
    const [refusal] = refusalsOf(() => work(notebook));
    expect(refusal).toMatchObject({ code: 'notebook-record-missing', value: 'number 99' });
    notebook.close();
  });
});

describe('search', () => {
  it('finds every word in names and notes, whatever the case or accents, names first', () => {
    const notebook = createNotebook(at('a.holdfast'));
    const cellId = keepCell(notebook, cell);
    createPlan(notebook, cellId, written(plan), cell);
    writeSession(notebook, createSession(notebook, cellId, '2026-03-14', ''), '', 'three steps were enough');
    const titles = (words: string) => searchNotebook(notebook, words).map((hit) => hit.title);
    expect(titles('STEPS three')).toEqual(['Three steps', '2026-03-14']);
    expect(titles('zurich apfel')).toEqual(['Three steps']);
    expect(titles('three nothing')).toEqual([]);
    expect(titles('  ')).toEqual([]);
    expect(searchNotebook(notebook, 'enough')[0]?.excerpt).toContain('were enough');
    notebook.close();
  });
});
