// Reads `patch-reference-case/1`: sweeps on a sketched cell with the answers another program gave. One plan per sweep.
import {
  planSchema,
  type Block,
  type GateDocument,
  type Lane,
  type PipetteDocument,
  type PipetteLetter,
  type PlanDocument,
} from '../contract/documents.ts';
import { refuse } from '../units/refuse.ts';

export const referenceFormat = 'patch-reference-case/1';

/** Values by trace key at `sampleTimes_ms`; mV or pA. */
export type ReferenceTraces = Readonly<Record<string, readonly number[]>>;

/** A named result; times in ms, values in the unit of the key (fC for integrals of currents). */
export type ReferenceMeasure =
  | { readonly name: string; readonly key: string; readonly kind: 'at'; readonly t: number; readonly value: number }
  | {
      readonly name: string;
      readonly key: string;
      readonly kind: 'crossings';
      readonly level: number;
      readonly values: readonly number[];
    }
  | {
      readonly name: string;
      readonly key: string;
      readonly kind: 'peak';
      readonly t0: number;
      readonly t1: number;
      readonly sign: number;
      readonly value: number;
      readonly time_ms: number;
    }
  | {
      readonly name: string;
      readonly key: string;
      readonly kind: 'integral';
      readonly t0: number;
      readonly t1: number;
      readonly baselineAt?: number;
      readonly value: number;
    };

export interface ReferenceSweep {
  readonly kind: 'covered';
  readonly name: string;
  /** Complete but for the step and the sampling interval, which the runner chooses. */
  readonly plan: PlanDocument;
  /** Which pipette plays each electrode. */
  readonly letters: Readonly<Record<string, PipetteLetter>>;
  readonly tEnd_ms: number;
  readonly sampleTimes_ms: readonly number[];
  readonly traces: ReferenceTraces;
  readonly measures: readonly ReferenceMeasure[];
}

/** A sweep that uses what a plan cannot express. */
export interface UncoveredSweep {
  readonly kind: 'not covered';
  readonly name: string;
  readonly what: string;
}

export interface ReferenceCase {
  readonly id: string;
  readonly title: string;
  /** Whether any channel has gates: passive cells are held to a closer tolerance. */
  readonly gated: boolean;
  readonly sweeps: readonly (ReferenceSweep | UncoveredSweep)[];
}

interface RawSegment {
  t0: number;
  t1: number;
  shape?: string;
  v0: number;
  v1: number;
}
interface RawElectrode {
  name: string;
  mode: 'currentClamp' | 'voltageClamp';
  compartment: string;
  Rs_MOhm: number;
  Cp_pF?: number;
  bridge_MOhm?: number;
  command: RawSegment[];
}
interface RawSweep {
  name: string;
  tEnd_ms: number;
  electrodes?: RawElectrode[];
  synapses?: unknown[];
  sampleTimes_ms: number[];
  traces: Record<string, number[]>;
  measures?: (ReferenceMeasure | { kind: 'fourier' })[];
}
interface RawModel {
  temperature_C: number;
  channels: Record<string, { reversal_mV: number; gates: GateDocument[]; source?: string }>;
  compartments: { name: string; area_um2: number; cm_uF_cm2: number; channels: Record<string, number> }[];
  couplings: [string, string, number][];
}
interface RawCase {
  format: string;
  id: string;
  title: string;
  model: RawModel;
  initial: { V_mV: number | number[] };
  sweeps: RawSweep[];
}

/**
 * A reference case from its parsed JSON.
 *
 * @throws Refusal `document-wrong-kind` where the format is another, `document-wrong-type` where a plan made of it is
 *         not a plan.
 */
export function referenceCase(json: unknown): ReferenceCase {
  const raw = json as Partial<RawCase> | null;
  if (typeof raw !== 'object' || raw?.format !== referenceFormat) {
    refuse('document-wrong-kind', {
      thing: 'format',
      place: 'format',
      value: String(raw?.format),
      remedy: `give a file whose format is ${referenceFormat}`,
    });
  }
  const given = raw as RawCase;
  return {
    id: given.id,
    title: given.title,
    gated: Object.values(given.model.channels).some(({ gates }) => gates.length > 0),
    sweeps: given.sweeps.map((sweep) => sweepOf(given, sweep)),
  };
}

function sweepOf(given: RawCase, sweep: RawSweep): ReferenceSweep | UncoveredSweep {
  const electrodes = sweep.electrodes ?? [];
  const what = notCovered(sweep, electrodes);
  if (what !== null) return { kind: 'not covered', name: sweep.name, what };

  // A rig has at least one pipette: a cell without electrodes gets one that does nothing.
  const first = given.model.compartments[0]!.name;
  const idle: RawElectrode = { name: '', mode: 'currentClamp', compartment: first, Rs_MOhm: 0, command: [] };
  const played = electrodes.length === 0 ? [idle] : electrodes;
  const letters: Record<string, PipetteLetter> = {};
  const lettered = played.map((electrode, e) => {
    const letter: PipetteLetter = e === 0 ? 'A' : 'B';
    letters[electrode.name] = letter;
    return { letter, electrode };
  });
  const measures = (sweep.measures ?? []) as ReferenceMeasure[];
  const keys = [...Object.keys(sweep.traces), ...measures.map(({ key }) => key)];
  const probed = [...new Set(keys.filter((key) => key.startsWith('V:')).map((key) => key.slice(2)))];
  const order = rootedOrder(given.model);
  const levels = given.initial.V_mV;
  const plan: unknown = {
    kind: 'plan',
    format: 1,
    name: `${given.id}, ${sweep.name}`.slice(0, 200),
    cell: cellOf(given, order),
    rig: { kind: 'rig', format: 1, name: 'as in the case', pipettes: lettered.map(pipetteOf) },
    protocol: {
      kind: 'protocol',
      format: 1,
      name: 'as in the case',
      sampling_us: 25,
      sweepInterval_ms: sweep.tEnd_ms,
      lanes: lettered.map(({ letter, electrode }) => laneOf(letter, electrode, sweep.tEnd_ms)),
    },
    probes: probed.map((compartment) => ({ name: `V:${compartment}`, site: { compartment } })),
    initial: { voltage_mV: Array.isArray(levels) ? order.map((i) => levels[i]!) : levels },
  };
  const checked = planSchema.safeParse(plan);
  if (!checked.success) {
    const issue = checked.error.issues[0];
    return refuse('document-wrong-type', {
      thing: 'plan made of the case',
      place: `${given.id}, sweep "${sweep.name}", ${issue?.path.join('.') ?? ''}`,
      value: issue?.message ?? 'unknown',
      remedy: 'look at that part of the case',
    });
  }
  return {
    kind: 'covered',
    name: sweep.name,
    plan: checked.data,
    letters,
    tEnd_ms: sweep.tEnd_ms,
    sampleTimes_ms: sweep.sampleTimes_ms,
    traces: sweep.traces,
    measures,
  };
}

/** What of a sweep a plan has no words for; null when it has them all. */
function notCovered(sweep: RawSweep, electrodes: readonly RawElectrode[]): string | null {
  if ((sweep.synapses ?? []).length > 0) return 'synapse';
  if (electrodes.length > 2) return 'more than two electrodes';
  const shapes = electrodes.flatMap(({ command }) => command.map(({ shape }) => shape ?? 'linear'));
  const strange = shapes.find((shape) => shape !== 'linear');
  if (strange !== undefined) return strange;
  const known = ['at', 'crossings', 'peak', 'integral'];
  return (sweep.measures ?? []).map(({ kind }) => kind).find((kind) => !known.includes(kind)) ?? null;
}

function cellOf(given: RawCase, order: readonly number[]): unknown {
  const { model } = given;
  return {
    kind: 'cell',
    format: 1,
    name: given.id,
    note: given.title,
    surroundings: { temperature_C: model.temperature_C },
    channels: Object.entries(model.channels).map(([name, channel]) => ({
      name,
      reversal_mV: channel.reversal_mV,
      gates: channel.gates.map(gateOf),
      ...(channel.source === undefined ? {} : { source: channel.source }),
    })),
    compartments: order
      .map((i) => model.compartments[i]!)
      .map(({ name, area_um2, cm_uF_cm2: capacitance_uF_cm2, channels }) => ({
        ...{ name, area_um2, capacitance_uF_cm2, channels },
      })),
    couplings_nS: model.couplings,
  };
}

/** Only what a gate has a word for; a case may say more, such as equations as text. */
function gateOf(gate: GateDocument): GateDocument {
  const { name, power, q10, q10Reference_C } = gate;
  const common = { name, power, q10, q10Reference_C };
  return 'alpha' in gate
    ? { ...common, alpha: gate.alpha, beta: gate.beta }
    : { ...common, inf: gate.inf, tau: gate.tau };
}

/** Compartments so that each stands after its neighbour towards the first: then the grid keeps this order. */
function rootedOrder(model: RawModel): number[] {
  const index = new Map(model.compartments.map(({ name }, i) => [name, i]));
  const near = model.compartments.map((): number[] => []);
  for (const [a, b] of model.couplings) {
    const i = index.get(a);
    const j = index.get(b);
    if (i === undefined || j === undefined) continue;
    near[i]!.push(j);
    near[j]!.push(i);
  }
  const order: number[] = [];
  const seen = new Set<number>();
  for (let from = 0; from < near.length; from++) {
    const waiting = [from];
    for (let i = waiting.pop(); i !== undefined; i = waiting.pop()) {
      if (seen.has(i)) continue;
      seen.add(i);
      order.push(i);
      waiting.push(...near[i]!.toReversed());
    }
  }
  return order;
}

function pipetteOf({ letter, electrode }: { letter: PipetteLetter; electrode: RawElectrode }): PipetteDocument {
  const clamp = electrode.mode === 'voltageClamp';
  return {
    letter,
    site: { compartment: electrode.compartment },
    mode: clamp ? 'voltage clamp' : 'current clamp',
    accessResistance_MOhm: electrode.Rs_MOhm,
    strayCapacitance_pF: clamp ? 0 : (electrode.Cp_pF ?? 0),
    bridge_MOhm: clamp ? 0 : (electrode.bridge_MOhm ?? 0),
  };
}

/** The command up to the sweep's end. Segments abut, the first starts at 0. */
function laneOf(pipette: PipetteLetter, electrode: RawElectrode, tEnd_ms: number): Lane {
  const { command } = electrode;
  const within = command.filter(({ t0 }) => t0 < tEnd_ms);
  const blocks = within.map(({ t0, t1, v0, v1 }, i): Block => {
    const end = Math.min(t1, tEnd_ms);
    const common = { id: `piece-${i + 1}`, duration_ms: end - t0 };
    if (v0 === v1) return { ...common, kind: 'step', level: v0 };
    return { ...common, kind: 'ramp', from: v0, to: v0 + ((v1 - v0) * (end - t0)) / (t1 - t0) };
  });
  const rest: Block = { kind: 'hold', id: 'rest', duration_ms: tEnd_ms };
  return {
    pipette,
    unit: electrode.mode === 'voltageClamp' ? 'mV' : 'pA',
    holding: within[0]?.v0 ?? 0,
    blocks: blocks.length === 0 ? [rest] : blocks,
  };
}
