// What comes back: drawings, traces, forecasts. Plain data; arrays are typed and travel as they are.
// Names carry the unit. Arrays over compartments are in grid order: index k is compartment k.
import type { RefusalData } from './refusal.ts';
import type { PipetteLetter, PlanDocument, ProtocolDocument, RigDocument, Site, Tolerance } from './documents.ts';

// ---- the cell as drawn ----------------------------------------------------------------------------------------

export interface SwcReport {
  readonly outcome: 'accept' | 'report' | 'refuse';
  /** Sorted; what each means stands in `findings`. */
  readonly codes: readonly string[];
  readonly findings: readonly SwcFinding[];
  /** Absent when refused. */
  readonly measures?: SwcMeasures;
  /** The header comments as written. */
  readonly header: readonly string[];
}
export interface SwcFinding {
  readonly code: string;
  /** What was found and what was done about it, in one sentence. */
  readonly words: string;
  readonly count: number;
  /** The first few line numbers, from 1. */
  readonly lines: readonly number[];
}
export interface SwcMeasures {
  readonly samples: number;
  readonly trees: number;
  readonly main_tree_samples: number;
  readonly soma: 'single' | 'three_point' | 'contour' | 'multi' | 'none' | 'mixed';
  readonly soma_area_um2: number;
  readonly neurite_length_um: number;
  readonly soma_link_length_um: number;
  readonly neurite_area_um2: number;
  readonly stem_count: number;
  readonly branch_count: number;
  readonly branch_point_count: number;
  readonly tip_count: number;
}

/** One branch as a polyline. Point i of branch: xyz_um[3i..3i+2], radius_um[i], at_um[i] from the branch's start. */
export interface DrawnBranch {
  readonly branch: number;
  /** -1 for the root. */
  readonly parent: number;
  readonly region: string;
  readonly xyz_um: Float64Array;
  readonly radius_um: Float64Array;
  readonly at_um: Float64Array;
  /** Path distance from the soma's surface to the branch's start. */
  readonly startDistance_um: number;
}
/** A cell to look at, and the grid it will be computed on. A sketched cell is laid out as a flat tree. */
export interface CellDrawing {
  readonly branches: readonly DrawnBranch[];
  readonly soma: { readonly xyz_um: readonly [number, number, number]; readonly radius_um: number } | null;
  readonly regions: readonly { readonly name: string; readonly area_um2: number; readonly length_um: number }[];
  readonly compartments: CompartmentTable;
  readonly totalArea_um2: number;
  readonly totalCapacitance_pF: number;
  /** With all gates at their operating-point values; null where there is no stable operating point. */
  readonly inputResistance_MOhm: number | null;
  readonly swcReport: SwcReport | null;
}
/** Grid order. `name` only for sketched cells. */
export interface CompartmentTable {
  readonly count: number;
  readonly branch: Int32Array;
  readonly at_um: Float64Array;
  readonly distance_um: Float64Array;
  readonly area_um2: Float64Array;
  readonly regionIndex: Int32Array;
  readonly regionNames: readonly string[];
  readonly names: readonly string[] | null;
}

// ---- rehearsal ------------------------------------------------------------------------------------------------

export interface Trace {
  readonly sweep: number;
  /** "recording:A", "command:A", "membrane:A" (at the pipette's site) or "membrane:<probe name>". */
  readonly key: string;
  readonly unit: 'mV' | 'pA';
  readonly start_ms: number;
  readonly interval_ms: number;
  readonly values: Float64Array;
}

export type RehearsalOutcome =
  | { readonly kind: 'finished'; readonly rehearsalId: number }
  | { readonly kind: 'cancelled'; readonly sweepsDone: number }
  /** The physics or a worker stopped it; nothing stored. */
  | { readonly kind: 'stopped'; readonly refusal: RefusalData };

/** One sweep while the job runs: enough to draw it at once. */
export interface SweepArrived {
  readonly sweep: number;
  readonly sweeps: number;
  readonly traces: readonly Trace[];
}

export interface RehearsalSummary {
  readonly rehearsalId: number;
  readonly planId: number;
  readonly planName: string;
  readonly sessionId: number | null;
  readonly rehearsedAt: string;
  readonly engineVersion: string;
  readonly sweeps: number;
  readonly step_us: number;
  readonly compartments: number;
  readonly wall_s: number;
  readonly hashes: { readonly plan: string; readonly cell: string; readonly rig: string; readonly protocol: string };
}

// ---- forecast -------------------------------------------------------------------------------------------------

export interface Forecast {
  /** Null when no pipette is in voltage clamp: there is no clamp error in current clamp. */
  readonly clamp: ClampForecast | null;
  readonly dualSite: DualSite | null;
  readonly readings: readonly ReadingForecast[];
  readonly pipettes: readonly PipetteForecast[];
  /** Plain sentences that put figures in doubt, such as membrane that fires under the clamp. */
  readonly cautions: readonly string[];
  /** Plain sentences a user must see: assumptions, refusals of parts. */
  readonly notes: readonly string[];
  readonly numerical: {
    readonly state: 'pending' | 'computed';
    readonly clampError_mV: number | null;
    readonly reach: number | null;
  };
}
/** Clamp error V(x, t) − V_ideal(t) over the window, against pipette `pipette`. */
export interface ClampForecast {
  readonly pipette: PipetteLetter;
  readonly tolerance: Tolerance;
  /** Per sweep. */
  readonly sweeps: readonly ClampSweep[];
  /** Share of membrane area within tolerance at the window's end in the worst sweep, 0 to 1. */
  readonly reach: number;
  readonly reachByRegion: readonly { readonly region: string; readonly area_um2: number; readonly reach: number }[];
  readonly worstSweep: number;
  /** First exit from the tolerance along each root-to-tip path; the smallest, µm. Null: never exits. */
  readonly trustDistance_um: number | null;
  /** The largest steady error at the clamp's own site over the sweeps, signed, mV. */
  readonly accessError_mV: number;
}
export interface ClampSweep {
  readonly sweep: number;
  /** Level of the window's block on the dial; null when it is not one level. */
  readonly level_mV: number | null;
  readonly windowStart_ms: number;
  readonly windowEnd_ms: number;
  readonly reach: number;
  /** The same by region, in this sweep. Absent in rehearsals stored by engines that did not give it. */
  readonly reachByRegion?: readonly { readonly region: string; readonly reach: number }[];
  /** Signed, per compartment. Steady: at the window's end. Worst: the largest |error| in the window, with its sign. */
  readonly steady_mV: Float64Array;
  readonly worst_mV: Float64Array;
  /** From the block's start to the last time |error| exceeds the tolerance; NaN: not within this window. */
  readonly settling_ms: Float64Array;
  /** Steady error at the clamp's site: the share of the access resistance. The rest is the cable's. */
  readonly accessPart_mV: number;
  /** The access part of every compartment's steady error: that at the site of the clamp nearest to it along the tree. */
  readonly access_mV: Float64Array;
}
export interface DualSite {
  readonly from: PipetteLetter;
  readonly to: PipetteLetter;
  /** |V_here / V_there| at DC, gates linearised at the operating point, no clamp active. */
  readonly attenuationAtoB: number;
  readonly attenuationBtoA: number;
  readonly inputResistanceA_MOhm: number;
  readonly inputResistanceB_MOhm: number;
  readonly transferResistance_MOhm: number;
}
export interface ReadingForecast {
  readonly reading: string;
  readonly name: string;
  readonly unit: 'pA' | 'mV' | 'fC' | 'mV·ms';
  /** Per sweep; NaN where it could not be taken. `truth` is null where there is none to compare with. */
  readonly recorded: Float64Array;
  readonly truth: Float64Array | null;
  readonly ladderValue: Float64Array;
}
export interface PipetteForecast {
  readonly letter: PipetteLetter;
  readonly site: Site;
  /** 1/(2π·R·C) with the whole cell's capacitance; null for an ideal pipette or current clamp. */
  readonly clampBandwidth_Hz: number | null;
  readonly largestCurrent_pA: number;
}

/** The fast passive answer while something is dragged: gates frozen at the operating point, steady state. */
export interface PassiveEstimate {
  /** Share of membrane within tolerance for the largest step of the plan, 0 to 1; null without a voltage clamp. */
  readonly reach: number | null;
  readonly accessError_mV: number | null;
  /** V(x)/V(clamp site) at DC per compartment under the clamp of A. */
  readonly control: Float64Array | null;
  readonly clampBandwidth_Hz: number | null;
  /** At the clamp's site, in current clamp at the first pipette's; no clamp active. */
  readonly inputResistance_MOhm: number;
  /** The same at each pipette's own site. */
  readonly inputResistances_MOhm: Readonly<Partial<Record<PipetteLetter, number>>>;
}

export interface StoredRehearsal {
  readonly summary: RehearsalSummary;
  readonly forecast: Forecast;
  readonly protocol: ProtocolDocument;
  /** The whole plan as it was rehearsed, its protocol included. */
  readonly plan: PlanDocument;
}

/** A rehearsal in a list: with the rig and the protocol it was run with, so that one can be told from another. */
export interface ListedRehearsal extends RehearsalSummary {
  readonly rig: RigDocument;
  readonly protocol: ProtocolDocument;
}
