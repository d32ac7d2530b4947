// The type column: fork and end marks of an older habit, and types that are not of the standard four.
import type { Findings } from './swc-findings.ts';
import { kidsAt, type Kids, type SwcDraft } from './swc-sample.ts';

/**
 * Gives samples of type 5 and 6 their parent's type where the file uses the two as marks for forks and tips: both present,
 * every 5 a fork on a typed neurite, every 6 a tip of one.
 *
 * @param order parents before children.
 */
export function repairTypes(
  samples: readonly SwcDraft[],
  kids: Kids,
  order: readonly number[],
  findings: Findings,
): void {
  const typed = (i: number) => i >= 0 && [2, 3, 4].includes(samples[i]!.type);
  const forks = indicesOfType(samples, 5);
  const ends = indicesOfType(samples, 6);
  const forkSet = new Set(forks);
  const areMarks =
    forks.length > 0 &&
    ends.length > 0 &&
    forks.every((i) => kidsAt(kids, i).length >= 2 && typed(samples[i]!.parent)) &&
    ends.every((i) => kidsAt(kids, i).length === 0 && (typed(samples[i]!.parent) || forkSet.has(samples[i]!.parent)));
  if (areMarks) {
    for (const i of order) {
      const s = samples[i]!;
      if (s.type !== 5 && s.type !== 6) continue;
      s.type = samples[s.parent]!.type;
      findings.note('W_TYPE_FORK_END', s.line);
    }
  }
  for (const s of samples) if (![1, 2, 3, 4].includes(s.type)) findings.note('W_TYPE_OTHER', s.line);
}

function indicesOfType(samples: readonly SwcDraft[], type: number): number[] {
  return samples.flatMap((s, i) => (s.type === type ? [i] : []));
}
