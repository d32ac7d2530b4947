// Plans in a folder: the plan file and the files it names.
import { readFileSync } from 'node:fs';
import { basename, dirname, resolve } from 'node:path';
import { textOfSwc } from '../cell/swc-text.ts';
import type { PlanDocument } from '../contract/documents.ts';
import { readPlanFile, wholePlan } from '../exchange/documents.ts';
import { mustBeReadable, refuseUnread } from './file-size.ts';
import { swcBytes } from './swc-file.ts';

/** Room for the largest shape in a plan that holds it whole. */
const mostBytes = 200_000_000;

/**
 * A plan file with everything in it, files named inside being relative to it.
 * @throws Refusal `file-not-found`, `file-unreadable`, `too-large`, and as `readPlanFile` for every document.
 */
export function readPlanWhole(path: string): PlanDocument {
  const plan = readPlanFile(readText(path), basename(path));
  const beside = (name: string): string => resolve(dirname(path), name);
  return wholePlan(
    plan,
    (name) => readText(beside(name)),
    (name) => textOfSwc(swcBytes(beside(name))),
  );
}

function readText(path: string): string {
  mustBeReadable(path, 'file', mostBytes);
  try {
    return readFileSync(path, 'utf8');
  } catch (cause) {
    return refuseUnread(path, 'file', cause);
  }
}
