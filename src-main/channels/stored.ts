// A published channel, from the description in its own file to what the solver evaluates.
import type { Rate } from '../contract/documents.ts';
import type { Gate, StoredChannel } from './kinetics.ts';
import { fromRates } from './own.ts';
import { rateOf } from './rate-forms.ts';

/** A function of V in mV, as a rate description where the paper's form is one. */
export type Course = Rate | ((V: number) => number);

interface Common {
  readonly name: string;
  readonly power: number;
  /** Absent: rates are not scaled with temperature. */
  readonly q10?: number;
}
type Courses =
  | { readonly alpha: Course; readonly beta: Course; readonly instant?: true }
  | { readonly inf: Course; readonly tau: Course }
  | { readonly inf: Course; readonly instant: true };
export type StoredGate = Common & Courses;

export interface StoredDescription {
  readonly name: string;
  readonly ion: StoredChannel['ion'];
  readonly title: string;
  readonly reversal_mV: number;
  /** Reference temperature of every gate. */
  readonly measuredAt_C: number | null;
  readonly gates: readonly StoredGate[];
  readonly source: string;
  readonly fromMemory: boolean;
  readonly note: string;
}

/** The working form of a published channel. @throws Error where a Q10 has no temperature to start from. */
export function storedChannel(given: StoredDescription): StoredChannel {
  const { reversal_mV: reversal, measuredAt_C: measuredAt, gates, ...rest } = given;
  return { ...rest, reversal, measuredAt, gates: gates.map((gate) => gateOf(gate, measuredAt)) };
}

function gateOf(gate: StoredGate, measuredAt: number | null): Gate {
  const { name, power, q10 = 1 } = gate;
  if (q10 !== 1 && measuredAt === null) throw new Error(`gate ${name} has a Q10 and no temperature`);
  // Where nothing is scaled the reference does not count.
  const common = { name, power, q10, q10Reference: measuredAt ?? 22 };
  if ('alpha' in gate) {
    const { inf, tau } = fromRates(courseOf(gate.alpha), courseOf(gate.beta));
    return { ...common, inf, tau: gate.instant === true ? () => 0 : tau };
  }
  return { ...common, inf: courseOf(gate.inf), tau: 'tau' in gate ? courseOf(gate.tau) : () => 0 };
}

function courseOf(course: Course): (V: number) => number {
  return typeof course === 'function' ? course : rateOf(course);
}
