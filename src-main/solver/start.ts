// Where a fresh sweep starts: at the plan's initial voltage, else at the operating point of its holding levels.
import type { Grid } from '../cell/grid.ts';
import type { Kinetics } from '../channels/kinetics.ts';
import type { PlanDocument } from '../contract/documents.ts';
import { toSi, type Second } from '../units/si.ts';
import { operatingPoint, type HeldPipette, type OperatingPoint } from './operating-point.ts';
import type { SolverPipette, SweepState } from './run.ts';

export interface Start {
  readonly state: SweepState;
  /** No steady state is stable: linear figures (attenuation, input resistance) do not exist here. */
  readonly firesOnItsOwn: boolean;
  /** What the user must know about it. */
  readonly notes: readonly string[];
}

export interface StartInput {
  readonly plan: PlanDocument;
  readonly grid: Grid;
  readonly kinetics: ReadonlyMap<string, Kinetics>;
  readonly temperature: number;
  readonly pipettes: readonly Omit<SolverPipette, 'command'>[];
  readonly step: Second;
  /** Index in the list of initial voltages for a compartment; by default its own. */
  readonly initialIndex?: (compartment: number) => number;
  /** Polled during the search for the operating point; true ends it. */
  readonly cancelled?: () => boolean;
}

/**
 * The start of a plan's sweeps: the same for all, since ladders change blocks and not holding levels.
 *
 * @throws Refusal as `operatingPoint`.
 */
export function startOf(input: StartInput): Start {
  const { plan, grid } = input;
  const given = plan.initial?.voltage_mV;
  if (given === undefined) return atOperatingPoint(input);
  const index = input.initialIndex ?? ((k) => k);
  const V = Float64Array.from({ length: grid.count }, (_, k) =>
    toSi(typeof given === 'number' ? given : (given[index(k)] ?? NaN), 'mV'),
  );
  const notes = ['Sweeps start at the voltage the plan gives, gates steady there, not at the operating point.'];
  return { state: { V }, firesOnItsOwn: false, notes };
}

function atOperatingPoint(input: StartInput): Start {
  const { state, firesOnItsOwn } = operatingPointOf(input);
  const notes = firesOnItsOwn
    ? ['The cell fires on its own at the holding levels: each sweep starts at the same moment of that activity.']
    : ['Sweeps start at the operating point: the steady state at the holding levels.'];
  return { state, firesOnItsOwn, notes };
}

/**
 * The steady state at the holding levels, whatever initial voltage the plan gives.
 *
 * @throws Refusal as `operatingPoint`.
 */
export function operatingPointOf(input: Omit<StartInput, 'initialIndex'>): OperatingPoint {
  const { grid, kinetics, temperature, step, cancelled } = input;
  const pipettes = heldPipettes(input);
  return operatingPoint({ grid, kinetics, temperature, pipettes, step, ...(cancelled && { cancelled }) });
}

/** The pipettes at the levels their lanes are held at. */
function heldPipettes(input: Pick<StartInput, 'plan' | 'pipettes'>): HeldPipette[] {
  return input.pipettes.map((pipette) => {
    const lane = input.plan.protocol.lanes.find((candidate) => candidate.pipette === pipette.letter);
    return { ...pipette, holding: lane === undefined ? 0 : toSi(lane.holding, lane.unit) };
  });
}
