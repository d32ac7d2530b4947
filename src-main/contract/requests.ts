// What a window, a shell or a test may ask of the engine. One schema per question, one type per answer:
// a handler that is missing does not compile (engine/handlers), nor does a call with the wrong shape.
import { z } from 'zod';
import { cellSchema, planSchema, siteSchema, type PlanDocument } from './documents.ts';
import type {
  CellDrawing,
  ListedRehearsal,
  PassiveEstimate,
  RehearsalOutcome,
  StoredRehearsal,
  SweepArrived,
  SwcReport,
  Trace,
} from './results.ts';
import type { RefusalData } from './refusal.ts';

const id = z.int().positive();
const text = z.string().max(1_000_000);
/**
 * Path of the notebook that the numbers in a question belong to. Refused when another is open by now: its plan 3 is not
 * the one that was meant. Whoever saves by itself, behind the user's back, gives it.
 */
const meantFor = z.string().min(1).optional();

/** Question schemas by request name. */
export const questions = {
  'engine about': z.strictObject({}),

  'notebook status': z.strictObject({}),
  'notebook create': z.strictObject({ path: z.string().min(1) }),
  'notebook open': z.strictObject({ path: z.string().min(1) }),
  /** Copies the whole notebook to a new file and goes on in the copy. Never overwrites. */
  'notebook save as': z.strictObject({ path: z.string().min(1) }),
  'notebook overview': z.strictObject({}),
  'notebook search': z.strictObject({ words: z.string().max(200) }),

  'cell import': z.strictObject({ name: z.string().min(1).max(200), bytes: z.instanceof(Uint8Array) }),
  'cell keep': z.strictObject({ cell: cellSchema }),
  'cell read': z.strictObject({ cellId: id }),
  'cell drawing': z.strictObject({ cell: cellSchema, sites: z.array(siteSchema).max(100).default([]) }),
  'cell remove': z.strictObject({ cellId: id, removed: z.boolean() }),

  /** The published channels, their curves at this temperature. */
  'channels stored': z.strictObject({ temperature_C: z.number().min(0).max(50) }),

  'plan create': z.strictObject({ plan: planSchema, cellId: id.optional() }),
  'plan open': z.strictObject({ planId: id }),
  'plan keep draft': z.strictObject({ planId: id, plan: planSchema, notebook: meantFor }),
  'plan name': z.strictObject({ planId: id, name: z.string().trim().min(1).max(200) }),
  /** Removing hides; undo brings back. */
  'plan remove': z.strictObject({ planId: id, removed: z.boolean() }),
  'plan check': z.strictObject({ plan: planSchema }),

  'session create': z.strictObject({ cellId: id, date: z.iso.date(), title: z.string().max(200).default('') }),
  'session write': z.strictObject({ sessionId: id, title: z.string().max(200), notes: text, notebook: meantFor }),
  'session read': z.strictObject({ sessionId: id }),

  /** A job: answers when it ends; progress and sweeps arrive as events under `jobId`, which the asker chooses. */
  'rehearsal start': z.strictObject({
    jobId: z.string().min(1).max(64),
    planId: id,
    plan: planSchema,
    sessionId: id.optional(),
  }),
  'rehearsal list': z.strictObject({ planId: id }),
  'rehearsal read': z.strictObject({ rehearsalId: id }),
  'rehearsal traces': z.strictObject({
    rehearsalId: id,
    sweeps: z.array(z.int().nonnegative()).max(10_000).optional(),
    from_ms: z.number().optional(),
    to_ms: z.number().optional(),
    /** Per trace; more are thinned to the minimum and maximum of each stretch. */
    mostPoints: z.int().min(16).max(1_000_000).default(4000),
  }),
  /** The local membrane voltage at any compartment of a stored rehearsal, re-run for that compartment when not kept. */
  'rehearsal membrane': z.strictObject({
    rehearsalId: id,
    compartment: z.int().nonnegative(),
    sweep: z.int().nonnegative(),
  }),
  'job cancel': z.strictObject({ jobId: z.string().min(1).max(64) }),

  'estimate passive': z.strictObject({ plan: planSchema }),

  'export plan': z.strictObject({ plan: planSchema }),
  /** One file per sweep; `asOne`: one for all, with the sweep in its first column. */
  'export traces': z.strictObject({ rehearsalId: id, asOne: z.boolean().default(false) }),
  'export forecast': z.strictObject({ rehearsalId: id }),
  'export figure': z.strictObject({ rehearsalId: id }),
  'import plan': z.strictObject({ name: z.string().min(1).max(200), text: z.string().min(1) }),
} as const;

export type RequestName = keyof typeof questions;
export type Question<N extends RequestName> = z.input<(typeof questions)[N]>;
export type CheckedQuestion<N extends RequestName> = z.output<(typeof questions)[N]>;

export interface About {
  readonly program: 'Holdfast';
  readonly version: string;
  readonly engineVersion: string;
  readonly workers: number;
}
export interface NotebookStatus {
  readonly path: string;
  readonly name: string;
  /** Another program has it open, or the file cannot be written. */
  readonly readOnly: boolean;
  readonly readOnlyReason: string | null;
  readonly savedAt: string | null;
}
export interface CellEntry {
  readonly cellId: number;
  readonly name: string;
  readonly plans: readonly PlanEntry[];
  readonly sessions: readonly SessionEntry[];
}
export interface PlanEntry {
  readonly planId: number;
  readonly name: string;
  readonly changedAt: string;
  readonly rehearsedAt: string | null;
}
export interface SessionEntry {
  readonly sessionId: number;
  readonly cellId: number;
  readonly date: string;
  readonly title: string;
  readonly rehearsals: readonly {
    readonly rehearsalId: number;
    readonly planId: number;
    readonly planName: string;
    readonly rehearsedAt: string;
  }[];
}
export interface NotebookOverview {
  readonly status: NotebookStatus;
  /** Removed ones left out. */
  readonly cells: readonly CellEntry[];
  /** Shown first on opening: the plan open last, else the newest rehearsed one. */
  readonly openPlanId: number | null;
}
export interface SearchHit {
  readonly kind: 'cell' | 'plan' | 'session';
  readonly id: number;
  readonly title: string;
  /** The words around the hit. */
  readonly excerpt: string;
}
export interface OpenedPlan {
  readonly planId: number;
  readonly cellId: number;
  readonly plan: PlanDocument;
  readonly savedAt: string;
  readonly rehearsals: readonly ListedRehearsal[];
}
/** What is wrong with a plan, and what it amounts to, before any run. */
export interface PlanCheck {
  readonly refusals: readonly RefusalData[];
  readonly cautions: readonly string[];
  readonly sweeps: number;
  readonly sweepDuration_ms: number;
  readonly totalTime_s: number;
  readonly compartments: number;
  readonly step_us: number;
}
/** A published channel as a list of them shows it. */
export interface ListedChannel {
  readonly id: string;
  readonly title: string;
  readonly ion: string;
  readonly reversal_mV: number;
  /** At which its rates were measured or fitted; null where the source states none: they are then never scaled. */
  readonly temperature_C: number | null;
  readonly source: string;
  /** The equations were not read in print. */
  readonly fromMemory: boolean;
  readonly note: string;
  readonly gates: readonly ListedGate[];
}
export interface ListedGate {
  readonly name: string;
  readonly power: number;
  /** 1: not scaled with temperature. */
  readonly q10: number;
  readonly voltages_mV: Float64Array;
  /** Steady state, 0 to 1. */
  readonly inf: Float64Array;
  /** Time constant at the temperature asked for; 0 at every voltage for a gate that follows at once. */
  readonly tau_ms: Float64Array;
}
export interface TextFile {
  readonly name: string;
  readonly text: string;
}

/** Answer types by request name. */
export interface Answers {
  'engine about': About;
  'notebook status': NotebookStatus;
  'notebook create': NotebookStatus;
  'notebook open': NotebookStatus;
  'notebook save as': NotebookStatus;
  'notebook overview': NotebookOverview;
  'notebook search': readonly SearchHit[];
  'cell import': { readonly cell: z.infer<typeof cellSchema> | null; readonly report: SwcReport };
  'cell keep': { readonly cellId: number };
  'cell read': { readonly cellId: number; readonly cell: z.infer<typeof cellSchema> };
  'cell drawing': CellDrawing;
  'cell remove': { readonly cellId: number };
  'channels stored': readonly ListedChannel[];
  'plan create': OpenedPlan;
  'plan open': OpenedPlan;
  'plan keep draft': { readonly savedAt: string };
  'plan name': { readonly planId: number };
  'plan remove': { readonly planId: number };
  'plan check': PlanCheck;
  'session create': { readonly sessionId: number };
  'session write': { readonly savedAt: string };
  'session read': SessionEntry & { readonly notes: string };
  'rehearsal start': RehearsalOutcome;
  'rehearsal list': readonly ListedRehearsal[];
  'rehearsal read': StoredRehearsal;
  'rehearsal traces': readonly Trace[];
  'rehearsal membrane': Trace;
  'job cancel': { readonly wasRunning: boolean };
  'estimate passive': PassiveEstimate;
  'export plan': TextFile;
  'export traces': readonly TextFile[];
  'export forecast': TextFile;
  'export figure': TextFile;
  'import plan': { readonly plan: PlanDocument };
}

// ---- the wire -------------------------------------------------------------------------------------------------

export interface Call {
  readonly call: number;
  readonly name: string;
  readonly question: unknown;
}
/** An expected no travels as data; a bug travels as a fault with the place in the log. */
export type Answer<T = unknown> =
  | { readonly ok: true; readonly value: T }
  | { readonly ok: false; readonly refusals: readonly [RefusalData, ...RefusalData[]] }
  | { readonly ok: false; readonly fault: string };

export type EngineEvent =
  | {
      readonly event: 'progress';
      readonly jobId: string;
      readonly what: string;
      /** 0 to 1. */
      readonly done: number;
      readonly left_s: number | null;
    }
  | { readonly event: 'sweep'; readonly jobId: string; readonly arrived: SweepArrived }
  | { readonly event: 'worker restarted'; readonly reason: string }
  | { readonly event: 'engine restarted'; readonly reason: string }
  | { readonly event: 'numerical'; readonly rehearsalId: number };

/** Engine to shell. */
export type EngineMessage =
  | { readonly kind: 'answer'; readonly call: number; readonly answer: Answer }
  | { readonly kind: 'event'; readonly event: EngineEvent };
