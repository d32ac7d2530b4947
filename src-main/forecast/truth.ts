// What each pipette would have recorded had everything been perfect: the side a reading is compared with.
import type { PreparedPlan } from '../solver/prepare.ts';
import type { SolverPipette, SweepInput, SweepState } from '../solver/run.ts';
import { runSweep } from '../solver/sweep.ts';
import type { LaidSweep } from '../protocol/sweeps.ts';
import { isPerfect } from '../rig/pipette.ts';
import { perfectClamp } from './perfect-clamp.ts';

/** A trace in SI per pipette in the rig's order; null where there is no truth, or none that a reading asks for. */
export type Truths = readonly (Float64Array | null)[];

/**
 * The true traces of a sweep, for the pipettes that readings are taken from.
 *
 * Voltage clamp: all ionic current of the cell under a perfect space clamp, less what current-clamp pipettes put in.
 * With two voltage clamps the cell's current divides between them and neither reading has a truth of its own.
 * Current clamp: the voltage at the site with the same currents through pipettes without resistance, capacitance or
 * bridge; the recording itself where the pipettes are that already.
 */
export function truthsOf(prepared: PreparedPlan, sweep: LaidSweep, run: Recorded): Truths | 'cancelled' {
  const asked = new Set(prepared.plan.protocol.readings.map(({ pipette }) => pipette));
  const clamps = prepared.pipettes.filter(({ mode }) => mode === 'voltage clamp');
  const injected = prepared.pipettes.filter(({ mode }) => mode === 'current clamp');
  const readsVoltage = injected.some(({ letter }) => asked.has(letter));
  let perfect: readonly Float64Array[] | null = run.recorded;
  if (readsVoltage && !injected.every(isPerfect)) {
    const again = runSweep({ ...withPerfectPipettes(run.input), ...(run.cancelled && { cancelled: run.cancelled }) });
    if (again.kind === 'cancelled') return 'cancelled';
    perfect = again.kind === 'done' ? again.recorded : null;
  }
  return prepared.pipettes.map((pipette, p) => {
    if (!asked.has(pipette.letter)) return null;
    if (pipette.mode === 'current clamp') return perfect?.[p] ?? null;
    return clamps.length === 1
      ? perfectClampCurrent(
          prepared,
          sweep,
          run,
          injected.map((other) => other.letter),
        )
      : null;
  });
}

export interface Recorded {
  readonly input: SweepInput;
  readonly recorded: readonly Float64Array[];
  /** Per pipette: the current entering the cell, A. */
  readonly current: readonly Float64Array[];
  readonly cancelled?: () => boolean;
}

/** The same sweep with nothing between the amplifier and the cell in current clamp. */
function withPerfectPipettes(input: SweepInput): SweepInput {
  const pipettes = input.pipettes.map((pipette): SolverPipette =>
    pipette.mode === 'current clamp' ? { ...pipette, access: 0, stray: 0, bridge: 0 } : pipette,
  );
  const { V, gates } = input.start;
  const start: SweepState = gates ? { V, gates } : { V };
  return { ...input, pipettes, start, probes: [] };
}

function perfectClampCurrent(
  prepared: PreparedPlan,
  sweep: LaidSweep,
  run: Recorded,
  injecting: readonly string[],
): Float64Array {
  const { plan, grid, kinetics, temperature, step, laidOut } = prepared;
  const letter = prepared.pipettes.find(({ mode }) => mode === 'voltage clamp')?.letter;
  const laneOf = (index: number) => laidOut.sweep(index).lanes.find(({ pipette }) => pipette === letter);
  const holding = laneOf(sweep.index)?.holding ?? NaN;
  const start =
    plan.initial === undefined
      ? new Float64Array(grid.count).fill(holding)
      : Float64Array.from(prepared.start().state.V);
  const clamp = perfectClamp({ grid, kinetics, temperature, start });
  if (plan.protocol.carryOver) {
    for (let before = 0; before < sweep.index; before += 1) {
      const { duration } = laidOut.sweep(before);
      clamp.pass(laneOf(before)?.command ?? [], step);
      clamp.pass([{ start: duration, end: laidOut.sweepInterval, v0: holding, v1: holding }], step);
    }
  }
  const { sampling } = laidOut;
  const samples = sweep.samples;
  const current = clamp.play(laneOf(sweep.index)?.command ?? [], { step, sampling, samples });
  const others = prepared.pipettes.flatMap((pipette, p) =>
    injecting.includes(pipette.letter) ? [run.current[p]] : [],
  );
  return others.reduce<Float64Array>((sum, other) => sum.map((I, i) => I - (other?.[i] ?? 0)), current);
}
