// The four documents a user keeps: cell, rig, protocol, plan. Units stand in field names; unknown fields are refused.
// Trade units throughout (mV, pA, ms, µm, MΩ, pF, nS): layers below convert to SI once, at the door.
import { z } from 'zod';

// Zod would otherwise probe for `eval`, which the page's content security policy reports.
z.config({ jitless: true });

/** Raised when a document's meaning changes; older formats are migrated, newer ones refused. */
export const documentFormat = 1;

const finite = z.number();
const positive = z.number().positive();
const atLeastZero = z.number().nonnegative();
const name = z.string().trim().min(1).max(200);
const format = z.literal(documentFormat);

// ---- channels -------------------------------------------------------------------------------------------------

export interface ConstRate {
  kind: 'const';
  value: number;
}
/** A·exp((V − V0)/k) · A/(1 + exp((V − V0)/k)) · A·(V − V0)/(1 − exp(−(V − V0)/k)), limit A·k at V0. */
export interface VoltageRate {
  kind: 'exp' | 'logistic' | 'linexp';
  A: number;
  V0: number;
  k: number;
}
export interface CombinedRate {
  kind: 'sum' | 'product';
  of: Rate[];
}
export interface InverseRate {
  kind: 'reciprocal';
  of: Rate;
}
export interface PowerRate {
  kind: 'power';
  of: Rate;
  exponent: number;
}
/** A function of V in mV. Rates α, β in 1/ms; time constants in ms; steady states without unit. */
export type Rate = ConstRate | VoltageRate | CombinedRate | InverseRate | PowerRate;

export const rateSchema: z.ZodType<Rate> = z.lazy(() =>
  z.union([
    z.strictObject({ kind: z.literal('const'), value: finite }),
    z.strictObject({
      kind: z.enum(['exp', 'logistic', 'linexp']),
      A: finite,
      V0: finite,
      k: finite.refine((k) => k !== 0, 'must not be 0'),
    }),
    z.strictObject({ kind: z.enum(['sum', 'product']), of: z.array(rateSchema).min(1).max(16) }),
    z.strictObject({ kind: z.literal('reciprocal'), of: rateSchema }),
    z.strictObject({ kind: z.literal('power'), of: rateSchema, exponent: finite }),
  ]),
);

const gateCommon = {
  name,
  power: z.int().min(1).max(8),
  /** Rates are multiplied by q10^((T − q10Reference_C)/10). 1 leaves them as they are. */
  q10: positive.default(1),
  q10Reference_C: finite.default(22),
};
export const gateSchema = z.union([
  z.strictObject({ ...gateCommon, alpha: rateSchema, beta: rateSchema }),
  z.strictObject({ ...gateCommon, inf: rateSchema, tau: rateSchema }),
]);
export type GateDocument = z.infer<typeof gateSchema>;

export const channelSchema = z.strictObject({
  name,
  reversal_mV: finite,
  /** No gate: a plain ohmic leak. */
  gates: z.array(gateSchema).max(8),
  source: z.string().max(2000).optional(),
});
/** I = g·Π gate^power·(V − E), outward positive. */
export type ChannelDocument = z.infer<typeof channelSchema>;

// ---- cell -----------------------------------------------------------------------------------------------------

export const generatorSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('sphere'), diameter_um: positive }),
  z.strictObject({
    kind: z.literal('ball-and-stick'),
    somaDiameter_um: positive,
    stickDiameter_um: positive,
    stickLength_um: positive,
  }),
  z.strictObject({
    kind: z.literal('tree'),
    cellType: z.enum(['layer-5-like pyramidal', 'fast interneuron', 'granule-like', 'round']),
    seed: z.int().min(0).max(4294967295),
    /** Multiplies every length, 1 for the adult proportions. */
    size: positive.max(10).default(1),
  }),
]);
export type Generator = z.infer<typeof generatorSchema>;

export const shapeSourceSchema = z.union([
  /** Relative to the document; exports replace it by the text. */
  z.strictObject({ kind: z.literal('swc'), file: z.string().min(1) }),
  z.strictObject({ kind: z.literal('swc'), text: z.string().min(1).max(100_000_000), fileName: z.string().optional() }),
  z.strictObject({ kind: z.literal('generator'), generator: generatorSchema }),
]);
export type ShapeSource = z.infer<typeof shapeSourceSchema>;

/** A named set of cable: by SWC type and by path distance from the soma's surface. The first that fits wins. */
export const regionSchema = z.strictObject({
  name,
  swcTypes: z.array(z.int()).min(1),
  from_um: atLeastZero.default(0),
  /** Absent: to the tips. */
  to_um: positive.optional(),
});
export type RegionDocument = z.infer<typeof regionSchema>;

export const makeUpSchema = z.strictObject({
  region: name,
  capacitance_uF_cm2: positive,
  axialResistivity_Ohm_cm: positive,
  /** Membrane area with spines ÷ smooth area. */
  spineFactor: z.number().min(1).max(10).default(1),
  leak: z.strictObject({ conductance_mS_cm2: atLeastZero, reversal_mV: finite }),
  channels: z
    .array(
      z.strictObject({
        /** A stored channel's id or the name of one of the cell's own. */
        channel: name,
        density_mS_cm2: atLeastZero,
        /** Replaces the channel's own reversal potential. */
        reversal_mV: finite.optional(),
      }),
    )
    .max(100)
    .default([]),
});
export type MakeUpDocument = z.infer<typeof makeUpSchema>;

export const compartmentSchema = z.strictObject({
  name,
  area_um2: positive,
  capacitance_uF_cm2: positive,
  /** Density by channel, mS/cm²: the cell's own channels or stored ones; leak is a channel without gates. */
  channels: z.record(z.string(), atLeastZero),
});

export const surroundingsSchema = z.strictObject({
  temperature_C: z.number().min(0).max(50),
});

const cellCommon = {
  kind: z.literal('cell'),
  format,
  name,
  note: z.string().max(20000).default(''),
  surroundings: surroundingsSchema,
  /** Channels of this cell's own, by rate description. */
  channels: z.array(channelSchema).max(100).default([]),
};
export const shapedCellSchema = z.strictObject({
  ...cellCommon,
  shape: shapeSourceSchema,
  regions: z.array(regionSchema).min(1).max(500),
  makeUp: z.array(makeUpSchema).min(1).max(500),
});
export const sketchedCellSchema = z.strictObject({
  ...cellCommon,
  compartments: z.array(compartmentSchema).min(1).max(100_000),
  /** [name, name, conductance in nS]; a loop is refused. */
  couplings_nS: z.array(z.tuple([z.string(), z.string(), positive])),
});
/** A cell given by its shape, or as a sketch: compartments and the couplings between them. */
export const cellSchema = z.union([shapedCellSchema, sketchedCellSchema]);
export type ShapedCellDocument = z.infer<typeof shapedCellSchema>;
export type SketchedCellDocument = z.infer<typeof sketchedCellSchema>;
export type CellDocument = z.infer<typeof cellSchema>;

// ---- rig ------------------------------------------------------------------------------------------------------

/** A place on the cell. Branch 0 is the soma; branches are numbered as the cell's drawing numbers them. */
export const siteSchema = z.union([
  z.strictObject({ branch: z.int().nonnegative(), at_um: atLeastZero }),
  z.strictObject({ compartment: name }),
]);
export type Site = z.infer<typeof siteSchema>;

export const pipetteLetters = ['A', 'B'] as const;
export const letterSchema = z.enum(pipetteLetters);
export type PipetteLetter = z.infer<typeof letterSchema>;

export const pipetteSchema = z.strictObject({
  letter: letterSchema,
  site: siteSchema,
  mode: z.enum(['voltage clamp', 'current clamp']),
  /** 0 is an ideal pipette: in voltage clamp the membrane at the site is the command. */
  accessResistance_MOhm: atLeastZero.max(10_000),
  strayCapacitance_pF: atLeastZero.max(1000).default(0),
  /** Current clamp only: the recorded voltage is the pipette's minus current × bridge. */
  bridge_MOhm: atLeastZero.max(10_000).default(0),
});
export type PipetteDocument = z.infer<typeof pipetteSchema>;

export const rigSchema = z.strictObject({
  kind: z.literal('rig'),
  format,
  name,
  note: z.string().max(20000).default(''),
  pipettes: z.array(pipetteSchema).min(1).max(pipetteLetters.length),
});
export type RigDocument = z.infer<typeof rigSchema>;

// ---- protocol -------------------------------------------------------------------------------------------------

const blockId = z.string().regex(/^[a-z0-9-]{1,40}$/);
/** Levels are dial values in the lane's unit: mV in voltage clamp, pA in current clamp. */
export const blockSchema = z.discriminatedUnion('kind', [
  /** Stays at the lane's holding level. */
  z.strictObject({ kind: z.literal('hold'), id: blockId, duration_ms: atLeastZero }),
  z.strictObject({ kind: z.literal('step'), id: blockId, duration_ms: atLeastZero, level: finite }),
  z.strictObject({ kind: z.literal('ramp'), id: blockId, duration_ms: atLeastZero, from: finite, to: finite }),
  /** `count` pulses of `width_ms`, one every 1000/rate_Hz ms, from the block's start; between them the base level. */
  z.strictObject({
    kind: z.literal('pulse train'),
    id: blockId,
    duration_ms: atLeastZero,
    level: finite,
    base: finite,
    width_ms: positive,
    rate_Hz: positive,
    count: z.int().min(1).max(100_000),
  }),
]);
export type Block = z.infer<typeof blockSchema>;
export type BlockKind = Block['kind'];

export const laneSchema = z.strictObject({
  pipette: letterSchema,
  unit: z.enum(['mV', 'pA']),
  holding: finite,
  blocks: z.array(blockSchema).min(1).max(1000),
});
export type Lane = z.infer<typeof laneSchema>;

/** Changes one number of one block from sweep to sweep; all ladders run in step, the longest sets the sweep count. */
export const ladderSchema = z.strictObject({
  lane: letterSchema,
  block: blockId,
  number: z.enum(['level', 'base', 'from', 'to', 'duration_ms', 'width_ms', 'rate_Hz', 'count']),
  rungs: z.union([
    z.strictObject({ start: finite, increment: finite, count: z.int().min(1).max(10_000) }),
    z.strictObject({ list: z.array(finite).min(1).max(10_000) }),
  ]),
});
export type Ladder = z.infer<typeof ladderSchema>;

/** Follows ladders: an edge of a block, moved by an offset. */
export const windowEdgeSchema = z.strictObject({
  block: blockId,
  edge: z.enum(['start', 'end']),
  offset_ms: finite.default(0),
});
export const windowSchema = z.strictObject({ lane: letterSchema, from: windowEdgeSchema, to: windowEdgeSchema });
export type Window = z.infer<typeof windowSchema>;

export const readingSchema = z.strictObject({
  id: blockId,
  name,
  /** Whose recording is read: its current in voltage clamp, its voltage in current clamp. */
  pipette: letterSchema,
  measure: z.enum(['peak', 'mean', 'charge']),
  /** Peak only: which way. "largest" takes the larger excursion from the baseline. */
  direction: z.enum(['positive', 'negative', 'largest']).default('largest'),
  window: windowSchema,
  /** Subtracted before measuring: the mean over this window. Absent: nothing is subtracted. */
  baseline: windowSchema.optional(),
});
export type Reading = z.infer<typeof readingSchema>;

export const protocolSchema = z.strictObject({
  kind: z.literal('protocol'),
  format,
  name,
  note: z.string().max(20000).default(''),
  sampling_us: positive.max(10_000),
  /** Start to start. */
  sweepInterval_ms: positive,
  /** One sweep when there is no ladder. */
  repeats: z.int().min(1).max(1000).default(1),
  /** False: each sweep starts afresh at the operating point. True: in order, the interval simulated. */
  carryOver: z.boolean().default(false),
  lanes: z.array(laneSchema).min(1).max(pipetteLetters.length),
  ladders: z.array(ladderSchema).max(64).default([]),
  readings: z.array(readingSchema).max(64).default([]),
});
export type ProtocolDocument = z.infer<typeof protocolSchema>;

// ---- plan -----------------------------------------------------------------------------------------------------

const fileReference = z.strictObject({ file: z.string().min(1) });
export const toleranceSchema = z.discriminatedUnion('unit', [
  z.strictObject({ unit: z.literal('mV'), value: positive }),
  /** Of |level − holding|; steps of 0 are left out. */
  z.strictObject({ unit: z.literal('%'), value: positive }),
]);
export type Tolerance = z.infer<typeof toleranceSchema>;

const planCommon = {
  kind: z.literal('plan'),
  format,
  name,
  note: z.string().max(20000).default(''),
  /** The reading asked for, and the bias the user can accept, in per cent of the true value. */
  question: z.strictObject({ reading: blockId, bias_percent: positive }).optional(),
  tolerance: toleranceSchema.default({ unit: 'mV', value: 5 }),
  /** Where clamp error is judged. Absent: the first block a ladder changes, else the longest that is not a hold. */
  clampWindow: windowSchema.optional(),
  probes: z
    .array(z.strictObject({ name, site: siteSchema }))
    .max(64)
    .default([]),
  /** Gates steady there. Absent: each sweep starts at the operating point. One number, or one per compartment. */
  initial: z.strictObject({ voltage_mV: z.union([finite, z.array(finite)]) }).optional(),
  /** Absent: chosen by the program. Must divide the sampling interval. */
  step_us: positive.optional(),
};
/** A plan as it lies in a folder: parts whole or as files beside it. */
export const planFileSchema = z.strictObject({
  ...planCommon,
  cell: z.union([cellSchema, fileReference]),
  rig: z.union([rigSchema, fileReference]),
  protocol: z.union([protocolSchema, fileReference]),
});
export type PlanFile = z.infer<typeof planFileSchema>;

/** A plan with everything in it: what the engine runs, what the notebook keeps. */
export const planSchema = z.strictObject({ ...planCommon, cell: cellSchema, rig: rigSchema, protocol: protocolSchema });
export type PlanDocument = z.infer<typeof planSchema>;

export type AnyDocument = CellDocument | RigDocument | ProtocolDocument | PlanDocument;
