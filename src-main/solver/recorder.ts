// What a sweep keeps: recordings, entering currents, probed voltages and channel currents, at samples and extra times.
import type { Grid } from '../cell/grid.ts';
import type { Ampere, Farad, Second } from '../units/si.ts';
import { commandAt, commandSlope, enteringCurrent, recordedVoltage, type Electrode } from './electrodes.ts';
import { channelCurrent, type GatedChannel, type Membrane } from './membrane.ts';
import type { SweepInput, SweepOutput } from './run.ts';

export type Kept = Omit<SweepOutput, 'extra' | 'end' | 'kind'>;

/** Channels of one compartment: ohmic ones as G and E, gated ones by place. */
interface Local {
  readonly compartment: number;
  readonly ohmic: readonly { readonly G: number; readonly E: number }[];
  readonly gated: readonly { readonly channel: GatedChannel; readonly i: number }[];
}

export interface Recorder {
  readonly electrodes: readonly Electrode[];
  readonly grid: Grid;
  readonly membrane: Membrane;
  readonly capacitance: Float64Array;
  readonly probes: readonly number[];
  readonly channelProbes: readonly { readonly local: Local }[];
  /** Per electrode: its compartment's channels and neighbours; empty but for ideal clamps. */
  readonly imposed: readonly (ImposedSite | null)[];
}

interface ImposedSite {
  readonly local: Local;
  readonly neighbours: readonly { readonly k: number; readonly G: number }[];
}

export function recorderOf(
  input: SweepInput,
  membrane: Membrane,
  electrodes: readonly Electrode[],
  capacitance: Float64Array,
): Recorder {
  const { grid } = input;
  const gatedNames = new Set(membrane.channels.map(({ name }) => name));
  const localOf = (compartment: number, only?: string): Local => ({
    compartment,
    ohmic: grid.conductances
      .filter(({ channel }) => !gatedNames.has(channel) && (only === undefined || channel === only))
      .map(({ conductance, reversal }) => ({ G: conductance[compartment]!, E: reversal[compartment]! })),
    gated: membrane.channels
      .filter(({ name }) => only === undefined || name === only)
      .map((channel) => ({ channel, i: channel.at.indexOf(compartment) }))
      .filter(({ i }) => i >= 0),
  });
  return {
    electrodes,
    grid,
    membrane,
    capacitance,
    probes: input.probes,
    channelProbes: (input.channelProbes ?? []).map(([compartment, channel]) => ({
      local: localOf(compartment, channel),
    })),
    imposed: electrodes.map((electrode) =>
      electrode.way === 'imposed'
        ? { local: localOf(electrode.compartment), neighbours: neighboursOf(grid, electrode.compartment) }
        : null,
    ),
  };
}

function neighboursOf(grid: Grid, compartment: number): { k: number; G: number }[] {
  const found: { k: number; G: number }[] = [];
  for (let k = 1; k < grid.count; k++) {
    if (grid.parent[k] === compartment) found.push({ k, G: grid.coupling[k]! });
    else if (k === compartment) found.push({ k: grid.parent[k]!, G: grid.coupling[k]! });
  }
  return found;
}

/** Room for `samples` entries of everything the recorder keeps. */
export function keptRoom(recorder: Recorder, samples: number): Kept {
  const room = (n: number): Float64Array[] => Array.from({ length: n }, () => new Float64Array(samples));
  return {
    samples,
    recorded: room(recorder.electrodes.length),
    current: room(recorder.electrodes.length),
    membrane: room(recorder.probes.length),
    channelCurrents: room(recorder.channelProbes.length),
  };
}

/** Writes entry `index`: the state at `time`, the gates being `ahead` behind it. */
export function keep(
  recorder: Recorder,
  kept: Kept,
  index: number,
  now: { readonly time: Second; readonly V: Float64Array; readonly ahead: Second },
): void {
  const { electrodes, probes, channelProbes } = recorder;
  const { time, V } = now;
  for (let p = 0; p < electrodes.length; p++) {
    const electrode = electrodes[p]!;
    const command = commandAt(electrode, time);
    const own = V[electrode.compartment]!;
    const entering =
      electrode.way === 'imposed' ? imposedCurrent(recorder, p, now) : enteringCurrent(electrode, own, command);
    kept.current[p]![index] = entering;
    // A clamp also charges the pipette's own wall on a ramp; a jump does so in no time.
    kept.recorded[p]![index] =
      electrode.way === 'imposed' || electrode.way === 'held'
        ? entering + electrode.stray * commandSlope(electrode)
        : recordedVoltage(electrode, own, command);
  }
  for (let i = 0; i < probes.length; i++) kept.membrane[i]![index] = V[probes[i]!]!;
  for (let i = 0; i < channelProbes.length; i++) {
    kept.channelCurrents[i]![index] = ionicCurrent(recorder, channelProbes[i]!.local, now);
  }
}

/**
 * Current of an ideal clamp: capacity current on ramps and the channels', less what neighbours and other pipettes bring.
 *
 *     I = C·dV/dt + Σ I_channels − Σ G·(V_neighbour − V) − Σ I_other
 */
function imposedCurrent(
  recorder: Recorder,
  p: number,
  now: { readonly time: Second; readonly V: Float64Array; readonly ahead: Second },
): Ampere {
  const electrode = recorder.electrodes[p]!;
  const site = recorder.imposed[p]!;
  const c = electrode.compartment;
  const V = now.V[c]!;
  const C: Farad = recorder.capacitance[c]!;
  let current = C * commandSlope(electrode) + ionicCurrent(recorder, site.local, now);
  for (const { k, G } of site.neighbours) current -= G * (now.V[k]! - V);
  for (const other of recorder.electrodes) {
    if (other !== electrode && other.compartment === c) {
      current -= enteringCurrent(other, V, commandAt(other, now.time));
    }
  }
  return current;
}

function ionicCurrent(
  recorder: Recorder,
  local: Local,
  now: { readonly V: Float64Array; readonly ahead: Second },
): Ampere {
  const V = now.V[local.compartment]!;
  let current = 0;
  for (const { G, E } of local.ohmic) current += G * (V - E);
  for (const { channel, i } of local.gated) current += channelCurrent(recorder.membrane, channel, i, V, now.ahead);
  return current;
}
