// The seam between the solver and those who use it: what a sweep needs, what it gives.
import type { Grid } from '../cell/grid.ts';
import type { Kinetics } from '../channels/kinetics.ts';
import type { CommandPiece } from '../protocol/command.ts';

export interface SolverPipette {
  readonly letter: string;
  readonly compartment: number;
  readonly mode: 'voltage clamp' | 'current clamp';
  /** Ω; 0 is ideal. */
  readonly access: number;
  /** F. */
  readonly stray: number;
  /** Ω. */
  readonly bridge: number;
  readonly command: readonly CommandPiece[];
}

export interface SweepInput {
  readonly grid: Grid;
  /** By channel name, for every entry of grid.conductances that has gates. */
  readonly kinetics: ReadonlyMap<string, Kinetics>;
  /** °C. */
  readonly temperature: number;
  readonly pipettes: readonly SolverPipette[];
  /** Seconds, from 0. */
  readonly duration: number;
  readonly sampling: number;
  /** Divides `sampling`. */
  readonly step: number;
  /** V per compartment, gates steady there; or a state carried over. */
  readonly start: SweepState;
  /** Compartments whose membrane voltage is kept at every sample. */
  readonly probes: readonly number[];
  /** Channel currents kept at every sample: [compartment, channel]. */
  readonly channelProbes?: readonly (readonly [number, string])[];
  /** Extra sample times besides the regular grid, s, ascending; steps land on them. */
  readonly extraTimes?: Float64Array;
  /** Called with V of all compartments after every regular sample: [sample index, V]. The array is reused. */
  readonly onSample?: (index: number, V: Float64Array) => void;
  /** Polled every few steps; true ends the run. */
  readonly cancelled?: () => boolean;
  /** Spacing of the gate tables, V; 0.1 mV when absent. */
  readonly tableSpacing?: number;
}

export interface SweepState {
  /** V, per compartment. */
  readonly V: Float64Array;
  /** Per gated channel, gates in order: gates[channelIndex][gateIndex][compartment]. Absent: steady at V. */
  readonly gates?: readonly (readonly Float64Array[])[];
  /** V, one per pipette in order; of use to pipettes with a node of their own. Absent: at its compartment's V. */
  readonly pipetteV?: Float64Array;
}

export interface SweepOutput {
  readonly kind: 'done';
  readonly samples: number;
  /** Per pipette: A in voltage clamp, V after the bridge in current clamp. */
  readonly recorded: readonly Float64Array[];
  /** Per pipette: the current entering the cell, A. */
  readonly current: readonly Float64Array[];
  /** Per probe, V. */
  readonly membrane: readonly Float64Array[];
  readonly channelCurrents: readonly Float64Array[];
  /** The same at `extraTimes`, when given. */
  readonly extra: Omit<SweepOutput, 'extra' | 'end' | 'kind'> | null;
  readonly end: SweepState;
}

export interface SweepDiverged {
  readonly kind: 'diverged';
  /** s */
  readonly time: number;
  readonly compartment: number;
}
export type SweepResult = SweepOutput | SweepDiverged | { readonly kind: 'cancelled' };
