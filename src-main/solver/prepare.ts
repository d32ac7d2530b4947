// From a plan as the user wrote it to everything a rehearsal needs, checked once. Below here nothing parses or checks.
import { cutGrid } from '../cell/cut.ts';
import type { Grid } from '../cell/grid.ts';
import type { Kinetics } from '../channels/kinetics.ts';
import { storedChannels } from '../channels/library.ts';
import { kineticsOf } from '../channels/own.ts';
import type { CellDocument, PlanDocument, Site, Window } from '../contract/documents.ts';
import { laneFaults } from '../protocol/check-lanes.ts';
import { Faults } from '../protocol/faults.ts';
import { layOut, type LaidOut } from '../protocol/sweeps.ts';
import { chosenStep, dividesSampling } from '../protocol/time-step.ts';
import { pipettesOf, rigFaults, type Pipette } from '../rig/pipette.ts';
import { fromSi, toSi, type Second } from '../units/si.ts';
import { channelNameFaults, ownChannelFaults } from './check-channels.ts';
import { planFaults } from './check-plan.ts';
import { clampWindowOf } from './clamp-window.ts';
import { defaultSpacing } from './gate-rows.ts';
import type { SolverPipette, SweepInput, SweepState } from './run.ts';
import { startOf, type Start } from './start.ts';

export interface PlacedPipette extends Pipette {
  readonly compartment: number;
}

/** A plan in SI: grid, kinetics, laid-out sweeps, placed pipettes and probes. */
export interface PreparedPlan {
  readonly plan: PlanDocument;
  readonly grid: Grid;
  /** By channel name, gated channels only. */
  readonly kinetics: ReadonlyMap<string, Kinetics>;
  /** °C. */
  readonly temperature: number;
  readonly laidOut: LaidOut;
  readonly pipettes: readonly PlacedPipette[];
  readonly probes: readonly { readonly name: string; readonly compartment: number }[];
  readonly step: Second;
  /** Null when no pipette is in voltage clamp. */
  readonly clampWindow: Window | null;
  /** Where a fresh sweep starts: found when first asked for, then shared by all sweeps. `cancelled` ends the search. */
  readonly start: (cancelled?: () => boolean) => Start;
  /** What the solver needs for sweep `sweep`; `from` replaces the fresh start when sweeps carry over. */
  readonly input: (sweep: number, from?: SweepState) => SweepInput;
}

export interface PrepareOptions {
  /** Multiplies the compartments' longest length: 0.5 cuts twice as finely. */
  readonly fineness?: number;
  /** Divides the step and the spacing of the gate tables: 2 takes twice as many of each. */
  readonly stepDivisor?: number;
  /** Cuts the grid; one that remembers may stand in. */
  readonly cut?: typeof cutGrid;
}

/**
 * Checks a plan and makes it ready to run.
 *
 * @throws Refusal with every fault of rig, protocol, channels, grid and of the plan that joins them. Places are JSON
 *         paths from "plan", "cell", "rig" and "protocol".
 */
export function preparePlan(plan: PlanDocument, options: PrepareOptions = {}): PreparedPlan {
  const fineness = options.fineness ?? 1;
  const faults = new Faults();
  faults.addAll(rigFaults(plan.rig));
  laneFaults(plan.protocol, plan.rig, faults);
  channelNameFaults(plan.cell, storedChannels.keys(), faults);
  ownChannelFaults(plan.cell, faults);
  stepFaults(plan, faults);
  const laidOut = faults.collect(() => layOut(plan.protocol));
  if (laidOut) planFaults(plan, laidOut.samplesInAll, faults);
  const cut = cutAtSites(plan, options, faults);
  const places = cut && placesOf(plan, cut, faults);
  if (cut) initialFaults(plan, cut, fineness, faults);
  faults.settle();
  if (laidOut === undefined || cut === undefined || places === undefined) throw new Error('faults were not settled');

  const kinetics = kineticsByName(plan.cell, cut);
  const grid = withOwnReversals(cut, kinetics);
  const temperature = plan.cell.surroundings.temperature_C;
  const step = stepOf(plan, laidOut) / (options.stepDivisor ?? 1);
  const initialIndex = initialIndexOf(plan, grid, fineness);
  let found: Start | undefined;
  const start = (cancelled?: () => boolean): Start =>
    (found ??= startOf({
      ...{ plan, grid, kinetics, temperature, ...places, step, initialIndex },
      ...(cancelled && { cancelled }),
    }));
  return {
    plan,
    grid,
    kinetics,
    temperature,
    laidOut,
    ...places,
    step,
    clampWindow: clampWindowOf(plan),
    start,
    input: (index, from) => {
      const sweep = laidOut.sweep(index);
      return {
        grid,
        kinetics,
        temperature,
        pipettes: places.pipettes.map((pipette) => playing(pipette, sweep.lanes)),
        duration: sweep.duration,
        sampling: laidOut.sampling,
        step,
        start: from ?? start().state,
        ...(options.stepDivisor === undefined ? {} : { tableSpacing: defaultSpacing / options.stepDivisor }),
        probes: [...places.pipettes, ...places.probes].map(({ compartment }) => compartment),
      };
    },
  };
}

/** The plan's own step as the whole part of the sampling interval that it is but for its rounding, else the chosen one. */
function stepOf({ step_us, protocol }: PlanDocument, { sampling, samplingTicks }: LaidOut): Second {
  return step_us === undefined ? chosenStep(samplingTicks) : sampling / Math.round(protocol.sampling_us / step_us);
}

/** A placed pipette with its lane's command. */
function playing(
  pipette: PlacedPipette,
  lanes: readonly { readonly pipette: string; readonly command: SolverPipette['command'] }[],
): SolverPipette {
  const { letter, compartment, mode, access, stray, bridge } = pipette;
  const command = lanes.find((lane) => lane.pipette === letter)?.command ?? [];
  return { letter, compartment, mode, access, stray, bridge, command };
}

/** The grid, a centre at every site. Sites off the cell are refused by their own paths, all of them. */
function cutAtSites(
  plan: PlanDocument,
  { fineness = 1, cut = cutGrid }: PrepareOptions,
  faults: Faults,
): Grid | undefined {
  const atSites = new Faults();
  const grid = atSites.collect(() => cut(plan.cell, sitesOf(plan), { fineness }));
  if (grid) return grid;
  const before = faults.count;
  const bare = faults.collect(() => cut(plan.cell, [], { fineness }));
  if (bare) placesOf(plan, bare, faults);
  if (faults.count === before) faults.addAll(atSites.all);
  return undefined;
}

function sitesOf(plan: PlanDocument): Site[] {
  return [...plan.rig.pipettes.map(({ site }) => site), ...plan.probes.map(({ site }) => site)];
}

function placesOf(
  plan: PlanDocument,
  grid: Grid,
  faults: Faults,
): Pick<PreparedPlan, 'pipettes' | 'probes'> | undefined {
  const pipettes = pipettesOf(plan.rig).flatMap((pipette, p) => {
    const compartment = faults.collect(() => grid.compartmentAt(pipette.site, `rig.pipettes[${p}].site`));
    return compartment === undefined ? [] : [{ ...pipette, compartment }];
  });
  const probes = plan.probes.flatMap((probe, p) => {
    const compartment = faults.collect(() => grid.compartmentAt(probe.site, `plan.probes[${p}].site`));
    return compartment === undefined ? [] : [{ name: probe.name, compartment }];
  });
  const ideal = pipettes.filter(({ mode, access }) => mode === 'voltage clamp' && access === 0);
  if (ideal.length > 1 && new Set(ideal.map(({ compartment }) => compartment)).size < ideal.length) {
    faults.add('quantity-out-of-range', {
      thing: 'access resistance of two voltage clamps on one spot',
      place: `rig.pipettes[${plan.rig.pipettes.length - 1}].accessResistance_MOhm`,
      value: '0 MΩ',
      remedy: 'give one of them an access resistance or move it: two ideal clamps cannot share a compartment',
    });
  }
  return { pipettes, probes };
}

function stepFaults(plan: PlanDocument, faults: Faults): void {
  if (plan.step_us === undefined || dividesSampling(plan.step_us, plan.protocol.sampling_us)) return;
  faults.add('quantity-out-of-range', {
    thing: 'time step',
    place: 'plan.step_us',
    value: `${plan.step_us} µs`,
    remedy: `give a whole part of the sampling interval, ${plan.protocol.sampling_us} µs, or leave it to the program`,
  });
}

function initialFaults(plan: PlanDocument, grid: Grid, fineness: number, faults: Faults): void {
  const given = plan.initial?.voltage_mV;
  if (!Array.isArray(given) || given.length === grid.count || fineness !== 1) return;
  faults.add('quantity-out-of-range', {
    thing: 'list of initial voltages',
    place: 'plan.initial.voltage_mV',
    value: `${given.length} numbers`,
    remedy: `give one number, or ${grid.count}: one per compartment`,
  });
}

/**
 * Which entry of a list of initial voltages is a compartment's: for a sketch the document's order, which the grid need
 * not keep; for a shape the order of the grid at fineness 1, of which a finer one takes the nearest centre.
 */
function initialIndexOf(plan: PlanDocument, grid: Grid, fineness: number): (compartment: number) => number {
  if (!Array.isArray(plan.initial?.voltage_mV)) return (k) => k;
  if ('compartments' in plan.cell) {
    const order = new Map(plan.cell.compartments.map(({ name }, i) => [name, i]));
    return (k) => order.get(grid.names?.[k] ?? '') ?? k;
  }
  if (fineness === 1) return (k) => k;
  const coarse = cutGrid(plan.cell, sitesOf(plan));
  return (k) => coarse.compartmentAt({ branch: grid.branch[k]!, at_um: fromSi(grid.at[k]!, 'um') }, 'plan.initial');
}

function kineticsByName(cell: CellDocument, grid: Grid): Map<string, Kinetics> {
  const own = new Map(cell.channels.map((channel) => [channel.name, kineticsOf(channel)]));
  const found = new Map<string, Kinetics>();
  for (const { channel } of grid.conductances) {
    const kinetics = own.get(channel) ?? storedChannels.get(channel);
    if (kinetics && kinetics.gates.length > 0) found.set(channel, kinetics);
  }
  return found;
}

// The grid knows no stored channels: where the make-up gives no reversal potential it leaves NaN for the channel's own.
function withOwnReversals(grid: Grid, kinetics: ReadonlyMap<string, Kinetics>): Grid {
  const conductances = grid.conductances.map((entry) => {
    const own = kinetics.get(entry.channel)?.reversal;
    if (own === undefined || !entry.reversal.some(Number.isNaN)) return entry;
    return { ...entry, reversal: entry.reversal.map((E) => (Number.isNaN(E) ? toSi(own, 'mV') : E)) };
  });
  return { ...grid, conductances };
}
