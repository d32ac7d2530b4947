// What worker threads can be asked to do. Each piece is pure: the same question gives the same answer in any thread.
import type { RefusalData } from '../contract/refusal.ts';
import type { CellDocument, PlanDocument, Site } from '../contract/documents.ts';
import type { Answers, PlanCheck, TextFile } from '../contract/requests.ts';
import type { CellDrawing, Forecast, PassiveEstimate, StoredRehearsal, Trace } from '../contract/results.ts';
import type { RehearsedSweep } from '../forecast/sweep-rehearsal.ts';
import { checkPlan } from './work/check.ts';
import { cellDrawing } from './work/drawing.ts';
import { figure, traceTables } from './work/export-texts.ts';
import { gather } from './work/gather.ts';
import { importCell } from './work/import-cell.ts';
import { estimate } from './work/estimate.ts';
import { membrane } from './work/membrane.ts';
import { sweeps } from './work/sweeps.ts';

/** A plan on its way to a worker. `key` is the plan's hash: a worker prepares a plan it knows only once. */
export interface SentPlan {
  readonly key: string;
  readonly plan: PlanDocument;
  /** Compartments and step halved: for numerical uncertainty. */
  readonly finer: boolean;
}

/** A sweep on its way back; `end` stays with the worker. */
export type SentSweep = Omit<RehearsedSweep, 'end'>;

export interface Works {
  sweeps: {
    question: { readonly sent: SentPlan; readonly sweeps: readonly number[] };
    part: SentSweep;
    /** `stopped`: the physics ended it. */
    answer:
      | { readonly kind: 'done' }
      | { readonly kind: 'cancelled' }
      | { readonly kind: 'stopped'; readonly refusal: RefusalData };
  };
  gather: {
    question: { readonly sent: SentPlan; readonly sweeps: readonly Omit<SentSweep, 'traces'>[] };
    part: never;
    answer: Forecast;
  };
  membrane: {
    question: { readonly sent: SentPlan; readonly sweep: number; readonly compartment: number };
    part: never;
    answer: Trace;
  };
  check: { question: { readonly plan: PlanDocument }; part: never; answer: PlanCheck };
  estimate: { question: { readonly plan: PlanDocument }; part: never; answer: PassiveEstimate };
  drawing: {
    question: { readonly cell: CellDocument; readonly sites: readonly Site[] };
    part: never;
    answer: CellDrawing;
  };
  'trace tables': {
    question: {
      readonly plan: { readonly name: string };
      readonly traces: readonly Trace[];
      readonly asOne: boolean;
    };
    part: never;
    answer: readonly TextFile[];
  };
  figure: {
    question: { readonly stored: Pick<StoredRehearsal, 'summary' | 'protocol'>; readonly traces: readonly Trace[] };
    part: never;
    answer: TextFile;
  };
  'import cell': {
    question: { readonly name: string; readonly bytes: Uint8Array };
    part: never;
    answer: Answers['cell import'];
  };
}
export type WorkName = keyof Works;
export type WorkQuestion<N extends WorkName> = Works[N]['question'];
export type WorkPart<N extends WorkName> = Works[N]['part'];
export type WorkAnswer<N extends WorkName> = Works[N]['answer'];

export interface WorkHooks<N extends WorkName = WorkName> {
  readonly cancelled: () => boolean;
  /** 0 to 1. */
  readonly progress: (done: number) => void;
  readonly part: (part: WorkPart<N>) => void;
}

const works: { readonly [N in WorkName]: (question: WorkQuestion<N>, hooks: WorkHooks<N>) => WorkAnswer<N> } = {
  sweeps,
  gather,
  membrane,
  check: checkPlan,
  estimate,
  drawing: cellDrawing,
  'trace tables': traceTables,
  figure,
  'import cell': importCell,
};

/** Does one piece of work. @throws Refusal as the work does. */
export function doWork(name: WorkName, question: unknown, hooks: WorkHooks): unknown {
  const work = works[name] as (question: unknown, hooks: WorkHooks) => unknown;
  return work(question, hooks);
}
