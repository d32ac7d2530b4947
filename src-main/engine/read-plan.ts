// Plans in a folder: the plan file and the files it names.
import { readFileSync } from 'node:fs';
import { basename, dirname, resolve } from 'node:path';
import type { PlanDocument } from '../contract/documents.ts';
import { readPlanFile, wholePlan } from '../exchange/documents.ts';
import { refuse } from '../units/refuse.ts';

/**
 * A plan file with everything in it, files named inside being relative to it.
 * @throws Refusal `file-not-found`, `file-unreadable`, and as `readPlanFile` for every document.
 */
export function readPlanWhole(path: string): PlanDocument {
  const plan = readPlanFile(readText(path), basename(path));
  return wholePlan(plan, (name) => readText(resolve(dirname(path), name)));
}

/** @throws Refusal `file-not-found`, `file-unreadable`. */
export function readText(path: string): string {
  try {
    return readFileSync(path, 'utf8');
  } catch (cause) {
    const code = (cause as NodeJS.ErrnoException).code ?? 'unreadable';
    return code === 'ENOENT' || code === 'ENOTDIR'
      ? refuse('file-not-found', { thing: 'file', place: path, value: 'missing', remedy: 'check the path' })
      : refuse('file-unreadable', { thing: 'file', place: path, value: code, remedy: 'check that you may read it' });
  }
}
