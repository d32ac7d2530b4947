import type { PlanDocument, ProtocolDocument, RigDocument } from '../../src-main/contract/documents.ts';
import type { Trace } from '../../src-main/contract/results.ts';

/** The traces of one sweep by key. */
export type SweepTraces = ReadonlyMap<string, Trace>;

/** Traces by sweep, then by key. */
export function bySweep(traces: readonly Trace[]): Map<number, Map<string, Trace>> {
  const sweeps = new Map<number, Map<string, Trace>>();
  for (const trace of traces) {
    const one = sweeps.get(trace.sweep) ?? new Map<string, Trace>();
    one.set(trace.key, trace);
    sweeps.set(trace.sweep, one);
  }
  return sweeps;
}

/** From the first sample to the last of all traces, ms; null without traces. */
export function timeRange(traces: readonly Trace[]): { from: number; to: number } | null {
  let from = Infinity;
  let to = -Infinity;
  for (const trace of traces) {
    if (trace.values.length === 0) continue;
    from = Math.min(from, trace.start_ms);
    to = Math.max(to, trace.start_ms + (trace.values.length - 1) * trace.interval_ms);
  }
  return to > from ? { from, to } : null;
}

/** The trace at a time, straight between its samples; null outside it. */
export function traceAt(trace: Trace | undefined, time_ms: number): number | null {
  if (!trace) return null;
  const at = (time_ms - trace.start_ms) / trace.interval_ms;
  const before = Math.floor(at + 1e-9);
  const share = Math.max(0, at - before);
  const a = trace.values[before];
  if (a === undefined) return null;
  const b = share > 1e-9 ? trace.values[before + 1] : a;
  if (b === undefined) return null;
  const value = a + share * (b - a);
  return Number.isFinite(value) ? value : null;
}

/** What the traces on show were run with; the plan in force stands in where the rig was not kept. */
export interface RunBasis {
  readonly protocol: ProtocolDocument;
  readonly rig: RigDocument;
}

export function runBasis(running: PlanDocument | null, stored: ProtocolDocument | null, plan: PlanDocument): RunBasis {
  return running ?? { protocol: stored ?? plan.protocol, rig: plan.rig };
}
