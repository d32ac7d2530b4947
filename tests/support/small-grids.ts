// Grids made by hand for the solver's tests: a few compartments, couplings in nS, everything else derived.
import type { Grid } from '../../src-main/cell/grid.ts';
import type { CommandPiece } from '../../src-main/protocol/command.ts';
import type { SolverPipette, SweepInput, SweepOutput, SweepResult, SweepState } from '../../src-main/solver/run.ts';

export interface SmallCompartment {
  /** -1 for the root. */
  readonly parent: number;
  /** To the parent, nS. */
  readonly coupling_nS?: number;
  readonly area_um2: number;
  readonly capacitance_uF_cm2?: number;
  /** Density by channel, mS/cm². */
  readonly channels: Readonly<Record<string, number>>;
}

/** A grid of the given compartments; reversal potentials by channel in mV. */
export function smallGrid(compartments: readonly SmallCompartment[], reversals_mV: Record<string, number>): Grid {
  const count = compartments.length;
  const per = (value: (c: SmallCompartment, k: number) => number): Float64Array =>
    Float64Array.from(compartments, value);
  const area = per(({ area_um2 }) => area_um2 * 1e-12);
  return {
    count,
    parent: Int32Array.from(compartments, ({ parent }) => parent),
    coupling: per(({ coupling_nS }) => (coupling_nS ?? 0) * 1e-9),
    area,
    capacitance: per(({ area_um2, capacitance_uF_cm2 }) => area_um2 * 1e-14 * (capacitance_uF_cm2 ?? 1)),
    conductances: Object.entries(reversals_mV).map(([channel, reversal]) => ({
      channel,
      reversal: per(() => reversal * 1e-3),
      conductance: per(({ area_um2, channels }) => area_um2 * 1e-12 * 10 * (channels[channel] ?? 0)),
    })),
    branch: Int32Array.from(compartments, (_, k) => k),
    at: new Float64Array(count),
    distance: new Float64Array(count),
    position: new Float64Array(3 * count),
    regionNames: ['all'],
    regionIndex: new Int32Array(count),
    regionArea: [area],
    regionStretch: null,
    names: null,
    compartmentAt: () => {
      throw new Error('no sites in a small grid');
    },
  };
}

export interface Cable {
  readonly d_um: number;
  readonly length_um: number;
  readonly Rm_ohm_cm2: number;
  readonly Ri_ohm_cm: number;
  readonly Cm_uF_cm2: number;
  readonly rest_mV: number;
}

/** A sealed passive cylinder in `pieces` equal parts: compartment k is centred at x = k·length/pieces, the ends are halves. */
export function cylinder(pieces: number, c: Cable): Grid {
  const dx = c.length_um / pieces;
  // π·d²/(4·Ri·dx), µm²/(Ω·cm·µm) = 1e-8 cm²/(1e-4 Ω·cm²) = 1e-4 S = 1e5 nS.
  const coupling_nS = (1e5 * (Math.PI * c.d_um ** 2)) / (4 * c.Ri_ohm_cm * dx);
  return smallGrid(
    Array.from({ length: pieces + 1 }, (_, k) => ({
      parent: k - 1,
      coupling_nS,
      area_um2: Math.PI * c.d_um * dx * (k === 0 || k === pieces ? 0.5 : 1),
      capacitance_uF_cm2: c.Cm_uF_cm2,
      channels: { leak: 1e3 / c.Rm_ohm_cm2 },
    })),
    { leak: c.rest_mV },
  );
}

/** A command of steps: [from ms, level] pairs, levels in mV or pA by `unit`. */
export function steps(
  unit: 'mV' | 'pA',
  end_ms: number,
  levels: readonly (readonly [number, number])[],
): CommandPiece[] {
  const scale = unit === 'mV' ? 1e-3 : 1e-12;
  return levels.map(([from, level], i) => ({
    start: from / 1e3,
    end: (levels[i + 1]?.[0] ?? end_ms) / 1e3,
    v0: level * scale,
    v1: level * scale,
  }));
}

/** A pipette with the fields that matter to the test; the rest ideal. */
export function pipette(
  mode: SolverPipette['mode'],
  command: readonly CommandPiece[],
  given: Partial<Omit<SolverPipette, 'mode' | 'command'>> = {},
): SolverPipette {
  return { letter: 'A', compartment: 0, access: 0, stray: 0, bridge: 0, ...given, mode, command };
}

/** All compartments at one level, gates steady there. */
export function allAt(grid: Grid, level_mV: number): SweepState {
  return { V: new Float64Array(grid.count).fill(level_mV * 1e-3) };
}

/** The defaults of a test sweep: 25 µs steps and samples, 6.3 °C, no probes. */
export function sweepOf(
  given: Pick<SweepInput, 'grid' | 'pipettes' | 'start' | 'duration'> & Partial<SweepInput>,
): SweepInput {
  return { kinetics: new Map(), temperature: 6.3, sampling: 25e-6, step: 25e-6, probes: [], ...given };
}

/** The output of a sweep that must not have stopped. */
export function finished(result: SweepResult): SweepOutput {
  if (result.kind !== 'done') throw new Error(`the sweep ended as ${result.kind}`);
  return result;
}

/** The largest difference between two courses of equal length; NaN where one has it. */
export function largestDifference(a: Float64Array, b: Float64Array): number {
  if (a.length !== b.length) throw new Error(`courses of ${a.length} and ${b.length} values`);
  return a.reduce((most, value, i) => Math.max(most, Math.abs(value - b[i]!)), 0);
}
