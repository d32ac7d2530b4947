// Rows to samples that know their parents.
import { SwcFault, type Findings } from './swc-findings.ts';
import type { SwcRow } from './swc-rows.ts';
import type { SwcDraft } from './swc-sample.ts';

/**
 * Samples in file order with the index of their parent.
 *
 * @throws SwcFault `E_MISSING_PARENT` at the first such line; `E_CYCLE` at the first line of a ring.
 */
export function connect(rows: readonly SwcRow[], findings: Findings): SwcDraft[] {
  const indexOf = new Map(rows.map((row, i) => [row.id, i]));
  const samples = rows.map((row, i): SwcDraft => {
    const parent = parentIndex(row, indexOf, findings);
    if (parent === i) throw new SwcFault('E_CYCLE', row.line);
    const { id, line, type, x, y, z, radius } = row;
    return { id, line, type, x, y, z, radius, parent, soma: false };
  });
  samples.forEach((s, i) => {
    if (s.parent > i) findings.note('W_ORDER', s.line);
  });
  refuseRings(samples);
  for (const s of samples) {
    const id = s.id.length < 9 ? Number(s.id) : Infinity;
    if (id < 1 || id > samples.length) findings.note('W_ID_GAPS', s.line);
  }
  return samples;
}

function parentIndex(row: SwcRow, indexOf: ReadonlyMap<string, number>, findings: Findings): number {
  const isRoot = row.parentId.startsWith('-') || (row.parentId === '0' && !indexOf.has('0'));
  if (isRoot) {
    if (row.parentId !== '-1') findings.note('W_ROOT_CODE', row.line);
    return -1;
  }
  const parent = indexOf.get(row.parentId);
  if (parent === undefined) throw new SwcFault('E_MISSING_PARENT', row.line);
  return parent;
}

/** Walks up from every sample; a walk that meets itself is a ring. Each sample is walked once. */
function refuseRings(samples: readonly SwcDraft[]): void {
  const walkedBy = new Int32Array(samples.length).fill(-1);
  for (let start = 0; start < samples.length; start += 1) {
    let i = start;
    while (i >= 0 && walkedBy[i] === -1) {
      walkedBy[i] = start;
      i = samples[i]!.parent;
    }
    if (i < 0 || walkedBy[i] !== start) continue;
    let line = samples[i]!.line;
    for (let j = samples[i]!.parent; j !== i; j = samples[j]!.parent) line = Math.min(line, samples[j]!.line);
    throw new SwcFault('E_CYCLE', line);
  }
}
