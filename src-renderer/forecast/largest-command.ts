import type { PipetteLetter } from '../../src-main/contract/documents.ts';
import type { Trace } from '../../src-main/contract/results.ts';

/** The current farthest from zero that a pipette is told to inject, over all sweeps, pA; null in voltage clamp. */
export function largestCommand(traces: readonly Trace[], letter: PipetteLetter): number | null {
  let far: number | null = null;
  for (const trace of traces) {
    if (trace.key !== `command:${letter}` || trace.unit !== 'pA') continue;
    far ??= 0;
    for (const value of trace.values) if (Math.abs(value) > Math.abs(far)) far = value;
  }
  return far;
}
