// One rehearsed sweep: plain data, so that it can pass from a worker to whoever gathers the forecast.
import type { ClampSweep, Trace } from '../contract/results.ts';
import type { SweepState } from '../solver/run.ts';

export interface RehearsedSweep {
  readonly kind: 'done';
  readonly sweep: number;
  /** Trade units; keys as in the contract's Trace. */
  readonly traces: readonly Trace[];
  /** Null without a voltage clamp, and where this sweep's step is left out of a tolerance in per cent. */
  readonly clamp: ClampSweep | null;
  /** In the order of the protocol's readings, in the unit of the reading; NaN where it could not be taken. */
  readonly readings: readonly { readonly recorded: number; readonly truth: number | null }[];
  /** Per pipette in the rig's order. */
  readonly largestCurrent_pA: readonly number[];
  /** Where the next sweep starts when sweeps carry over; the interval between them is already simulated. */
  readonly end: SweepState;
}

export type SweepRehearsal =
  | RehearsedSweep
  | { readonly kind: 'cancelled'; readonly sweep: number }
  | { readonly kind: 'diverged'; readonly sweep: number; readonly time_ms: number; readonly compartment: number };
