// The answer while something is being dragged: linear, steady, at once.
import { cutGrid } from '../cell/cut.ts';
import type { Grid } from '../cell/grid.ts';
import type { PlanDocument } from '../contract/documents.ts';
import type { PassiveEstimate } from '../contract/results.ts';
import { commandReader } from '../protocol/command-course.ts';
import type { LaidSweep } from '../protocol/sweeps.ts';
import { rungsOf } from '../protocol/ladder.ts';
import { clampBandwidth } from '../rig/pipette.ts';
import { frozenVoltages, type LevelledClamp } from '../solver/frozen.ts';
import { preparePlan, type PreparedPlan } from '../solver/prepare.ts';
import { operatingPointOf } from '../solver/start.ts';
import { steadyMembrane } from '../solver/steady-membrane.ts';
import { controlFrom, inputResistance, steadyTree } from '../solver/steady.ts';
import { fromSi, toSi, type Volt } from '../units/si.ts';
import { clampTarget, referenceClamp, type ClampTarget } from './clamp-sweep.ts';
import { reachOf } from './reach.ts';

/** What one estimate may leave for the next of a like plan; the caller keeps it. */
export interface EstimateMemory {
  grid?: { readonly key: string; readonly grid: Grid };
  rest?: { readonly key: string; readonly V: Float64Array };
}

/** An ideal clamp as a conductance to ground, S: 10⁶ times any cell's, small enough to lose no digits that matter. */
const idealShunt = 1;

/**
 * Steady linear estimate of a plan: every gate frozen at its steady state at the holding level (in current clamp: at
 * the operating point), the largest step of the clamp window, no time. Reach and access error are what a rehearsal
 * would give for a membrane without gates; with gates they leave out what the step opens.
 *
 * @throws Refusal as `preparePlan`, and in current clamp as `operatingPoint`.
 * @source linear cable at DC: Rall W (1959), Exp Neurol 1:491–527 (from memory).
 */
export function passiveEstimate(plan: PlanDocument, memory: EstimateMemory = {}): PassiveEstimate {
  const prepared = preparePlan(plan, { cut: remembering(memory) });
  const clamp = referenceClamp(prepared);
  return clamp === undefined ? freeEstimate(prepared, memory) : clampEstimate(prepared, clamp.compartment);
}

function clampEstimate(prepared: PreparedPlan, site: number): PassiveEstimate {
  const { grid, kinetics, temperature } = prepared;
  const holding = referenceHolding(prepared);
  const membrane = steadyMembrane(grid, kinetics, temperature, new Float64Array(grid.count).fill(holding));
  const clamps = prepared.pipettes.filter(({ mode }) => mode === 'voltage clamp');
  const others = clamps
    .slice(1)
    .map(({ compartment, access }): [number, number] => [compartment, access === 0 ? idealShunt : 1 / access]);
  const capacitance = grid.capacitance.reduce((sum, C) => sum + C, 0);
  const judged = judge(prepared, membrane, holding, site);
  return {
    reach: judged?.reach ?? null,
    accessError_mV: judged === null ? null : fromSi(judged.accessError, 'mV'),
    control: controlFrom(steadyTree(grid, membrane.chord, others), site),
    clampBandwidth_Hz: clampBandwidth(clamps[0]?.access ?? 0, capacitance),
    ...inputResistances(prepared, membrane.chord, site),
  };
}

/** At the site and at every pipette's own, no clamp active. */
function inputResistances(
  { grid, pipettes }: PreparedPlan,
  chord: Parameters<typeof steadyTree>[1],
  site: number,
): Pick<PassiveEstimate, 'inputResistance_MOhm' | 'inputResistances_MOhm'> {
  const tree = steadyTree(grid, chord);
  const at = (compartment: number): number => fromSi(inputResistance(tree, compartment), 'MOhm');
  return {
    inputResistance_MOhm: at(site),
    inputResistances_MOhm: Object.fromEntries(pipettes.map(({ letter, compartment }) => [letter, at(compartment)])),
  };
}

/** Clamp error of the frozen cell in the sweep with the largest step; null where no sweep has one to judge. */
function judge(
  prepared: PreparedPlan,
  membrane: Parameters<typeof frozenVoltages>[1],
  holding: Volt,
  site: number,
): { readonly reach: number; readonly accessError: Volt } | null {
  const { grid } = prepared;
  const largest = largestStep(prepared, holding);
  if (largest === null) return null;
  const { sweep, target, level } = largest;
  const clamps = prepared.pipettes
    .filter(({ mode }) => mode === 'voltage clamp')
    .map(({ letter, compartment, access }): LevelledClamp => ({
      compartment,
      conductance: access === 0 ? Infinity : 1 / access,
      level: levelAtEnd(prepared, sweep, letter, target),
    }));
  const error = frozenVoltages(grid, membrane, holding, clamps).map((V) => V - level);
  return { reach: reachOf(grid, error, target.tolerance), accessError: error[site] ?? NaN };
}

interface JudgedSweep {
  readonly sweep: LaidSweep;
  readonly target: ClampTarget;
  readonly level: Volt;
}

function largestStep(prepared: PreparedPlan, holding: Volt): JudgedSweep | null {
  let largest: JudgedSweep | null = null;
  for (let rung = 0; rung < rungsOf(prepared.plan.protocol); rung += 1) {
    const sweep = prepared.laidOut.sweep(rung);
    const target = clampTarget(prepared, sweep);
    if (target === null) continue;
    const level = levelAtEnd(prepared, sweep, target.pipette.letter, target);
    if (largest === null || Math.abs(level - holding) > Math.abs(largest.level - holding)) {
      largest = { sweep, target, level };
    }
  }
  return largest;
}

/** A lane's command in the last moment of the window. */
function levelAtEnd(prepared: PreparedPlan, sweep: LaidSweep, letter: string, { window }: ClampTarget): Volt {
  const command = sweep.lanes.find(({ pipette }) => pipette === letter)?.command ?? [];
  const { sampling } = prepared.laidOut;
  // A hair before the end, which belongs to what comes next: 1e-5 of a sampling interval.
  return commandReader(command, sampling)(window.to - 1e-5 * sampling);
}

function referenceHolding(prepared: PreparedPlan): Volt {
  const letter = referenceClamp(prepared)?.letter;
  const lane = prepared.plan.protocol.lanes.find(({ pipette }) => pipette === letter);
  return lane === undefined ? NaN : toSi(lane.holding, lane.unit);
}

/** Without a voltage clamp there is nothing to control; what is left is the cell itself at the first pipette. */
function freeEstimate(prepared: PreparedPlan, memory: EstimateMemory): PassiveEstimate {
  const { grid, kinetics, temperature, plan, pipettes } = prepared;
  const site = pipettes[0]?.compartment ?? 0;
  const holdings = plan.protocol.lanes.map(({ pipette, holding }) => [pipette, holding]);
  const key = JSON.stringify([plan.cell, holdings, pipettes.map(({ compartment }) => compartment)]);
  const known = memory.rest?.key === key ? memory.rest.V : undefined;
  const V = known ?? operatingPointOf(prepared).state.V;
  memory.rest = { key, V };
  const { chord } = steadyMembrane(grid, kinetics, temperature, V);
  return {
    reach: null,
    accessError_mV: null,
    control: null,
    clampBandwidth_Hz: null,
    ...inputResistances(prepared, chord, site),
  };
}

function remembering(memory: EstimateMemory): typeof cutGrid {
  return (cell, sites, options) => {
    const key = JSON.stringify([cell, sites, options?.fineness]);
    const grid = memory.grid?.key === key ? memory.grid.grid : cutGrid(cell, sites, options);
    memory.grid = { key, grid };
    return grid;
  };
}
