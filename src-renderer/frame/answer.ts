// What the answer line says: the asked reading, and the figures beside it. Pure; wording and slots in AnswerLine.
import type { PlanDocument } from '../../src-main/contract/documents.ts';
import type { RefusalData } from '../../src-main/contract/refusal.ts';
import type { Forecast, PassiveEstimate, ReadingForecast } from '../../src-main/contract/results.ts';
import { biasWords, type BiasUnit } from '../text/bias.ts';
import { figure, given, percent, scaled, signedFigure, thinSpace } from '../text/quantity.ts';

export interface AskedReading {
  readonly name: string;
  readonly sweep: number;
  readonly reads: string;
  /** Null where there is no truth to compare with (current clamp through a perfect pipette is asked apart). */
  readonly is: string | null;
  readonly verdict: { readonly kind: 'holds' | 'outside'; readonly words: string } | null;
}
export interface Figure {
  readonly key: 'reach' | 'trust' | 'access' | 'bandwidth' | 'numerical';
  readonly before: string;
  readonly value: string;
  readonly after: string;
}
export interface AnswerContent {
  readonly kind: 'final' | 'estimate' | 'refused' | 'nothing';
  readonly asked: AskedReading | null;
  /** The first row where there is no asked reading to show. */
  readonly sentence: string;
  readonly remedy: string;
  readonly figures: readonly Figure[];
}

/**
 * The sweep that speaks for a reading: the one with the largest bias among those whose true value is at least a tenth
 * of the largest. Nearer to zero a ratio says nothing (near the reversal potential any clamp looks bad).
 *
 * @returns its index, or −1 when nothing could be read.
 */
export function tellingSweep(reading: ReadingForecast): number {
  const { recorded, truth } = reading;
  const weight = truth ?? recorded;
  const largest = weight.reduce((m, v) => (Math.abs(v) > m ? Math.abs(v) : m), 0);
  let best = -1;
  let bestBias = -1;
  for (let k = 0; k < recorded.length; k++) {
    const r = recorded[k] ?? NaN;
    const w = weight[k] ?? NaN;
    if (Number.isNaN(r) || Number.isNaN(w) || Math.abs(w) < largest / 10) continue;
    const bias = truth === null ? Math.abs(r) : Math.abs(r - w) / Math.max(Math.abs(w), Number.MIN_VALUE);
    if (bias > bestBias) {
      bestBias = bias;
      best = k;
    }
  }
  return best;
}

/** The asked reading of a forecast; null when nothing is asked or it could not be read in any sweep. */
export function askedReading(plan: PlanDocument, forecast: Forecast): AskedReading | null {
  const question = plan.question;
  const reading = forecast.readings.find((r) => r.reading === question?.reading);
  if (question === undefined || reading === undefined) return null;
  const sweep = tellingSweep(reading);
  if (sweep < 0) return null;
  const reads = reading.recorded[sweep] ?? NaN;
  const is = reading.truth?.[sweep] ?? null;
  return {
    name: reading.name,
    sweep,
    reads: scaled(reads, reading.unit),
    is: is === null ? null : scaled(is, reading.unit),
    verdict: is === null ? null : verdict(reads, is, question.bias_percent, reading.unit),
  };
}

function verdict(reads: number, is: number, accepted_percent: number, unit: BiasUnit): AskedReading['verdict'] {
  const bias = is === 0 ? Infinity : (100 * Math.abs(reads - is)) / Math.abs(is);
  const asked = given(accepted_percent, '%');
  const words = `the ${asked} asked, ${biasWords(reads, is, unit)}`;
  return bias <= accepted_percent ? { kind: 'holds', words: `within ${words}` } : { kind: 'outside', words };
}

/** The second row of a finished rehearsal. */
export function finalFigures(forecast: Forecast): readonly Figure[] {
  const { clamp, numerical } = forecast;
  const bandwidth = forecast.pipettes.find((p) => p.clampBandwidth_Hz !== null)?.clampBandwidth_Hz ?? null;
  const rows: Figure[] = [];
  if (clamp !== null) {
    rows.push(reach(clamp.reach));
    rows.push(
      clamp.trustDistance_um === null
        ? { key: 'trust', before: 'trusted ', value: 'to every tip', after: '' }
        : {
            key: 'trust',
            before: 'trusted to ',
            value: given(Math.round(clamp.trustDistance_um), 'µm'),
            after: '',
          },
    );
    rows.push(access(clamp.accessError_mV));
  }
  if (bandwidth !== null) rows.push(band(bandwidth));
  rows.push({ key: 'numerical', before: 'numerical ', ...numericalWords(numerical) });
  return rows;
}

function numericalWords(numerical: Forecast['numerical']): Pick<Figure, 'value' | 'after'> {
  if (numerical.state === 'pending') return { value: 'pending', after: '' };
  if (numerical.clampError_mV !== null) {
    return { value: `±${figure(Math.abs(numerical.clampError_mV), 'mV', 2)}`, after: '' };
  }
  return { value: 'none to state', after: '' };
}

/** The second row while only the passive estimate is there: the same slots. */
export function estimateFigures(estimate: PassiveEstimate): readonly Figure[] {
  const rows: Figure[] = [];
  if (estimate.reach !== null) {
    rows.push(reach(estimate.reach));
    rows.push({ key: 'trust', before: 'trusted to ', value: '(to come)', after: '' });
  }
  if (estimate.accessError_mV !== null) rows.push(access(estimate.accessError_mV));
  if (estimate.clampBandwidth_Hz !== null) rows.push(band(estimate.clampBandwidth_Hz));
  rows.push({ key: 'numerical', before: 'numerical ', value: '(to come)', after: '' });
  return rows;
}

function reach(share: number): Figure {
  return { key: 'reach', before: 'Reach ', value: percent(share), after: ' of membrane' };
}
function access(error_mV: number): Figure {
  return { key: 'access', before: 'access error up to ', value: signedFigure(error_mV, 'mV', 2), after: '' };
}
function band(hz: number): Figure {
  return { key: 'bandwidth', before: 'clamp bandwidth ', value: scaled(hz, 'Hz', 2), after: '' };
}

interface Known {
  readonly plan: PlanDocument;
  /** Of the plan as it stands; null when there is none or it was edited since. */
  readonly forecast: Forecast | null;
  /** Of an earlier state of the plan: gives the asked reading its name and its room, not its figures. */
  readonly estimate: PassiveEstimate | null;
  readonly refusals: readonly RefusalData[];
}

/** The whole answer. */
export function answerContent({ plan, forecast, estimate, refusals }: Known): AnswerContent {
  const first = refusals[0];
  if (first !== undefined) {
    return {
      kind: 'refused',
      asked: null,
      sentence: `with these settings: ${first.thing} at ${first.place} is ${first.value}`,
      remedy: first.remedy,
      figures: [],
    };
  }
  if (forecast !== null) return finalAnswer(plan, forecast);
  const reading = plan.protocol.readings.find((r) => r.id === plan.question?.reading);
  return {
    kind: estimate === null ? 'nothing' : 'estimate',
    asked: null,
    sentence:
      reading === undefined
        ? 'No reading is asked for yet.'
        : `${reading.name} is read when the plan is rehearsed (Space).`,
    remedy: '',
    figures: estimate === null ? [] : estimateFigures(estimate),
  };
}

function finalAnswer(plan: PlanDocument, forecast: Forecast): AnswerContent {
  const asked = askedReading(plan, forecast);
  const reading = plan.protocol.readings.find((r) => r.id === plan.question?.reading);
  const sentence =
    asked !== null
      ? ''
      : reading === undefined
        ? 'No reading is asked for: choose one in the line above.'
        : `${reading.name} could not be read in any sweep.`;
  return { kind: 'final', asked, sentence, remedy: '', figures: finalFigures(forecast) };
}

/** Where a figure comes from, for its note. */
export const derivations: Readonly<
  Record<Figure['key'] | 'asked', { readonly title: string; readonly words: readonly string[] }>
> = {
  asked: {
    title: 'Reads and is',
    words: [
      'Reads: the reading taken from the predicted recording. Is: the same reading taken by the same code from an ideal clamp, which imposes the command on all membrane at once.',
      `Shown for the sweep with the largest bias. Sweeps whose true value is under a tenth of the largest are left out: near zero a ratio says nothing.`,
    ],
  },
  reach: {
    title: 'Reach',
    words: [
      'The share of membrane area, spines and axon included, whose clamp error at the end of the window stays within the tolerance, in the worst sweep.',
      'Clamp error: the membrane voltage less the ideal one, V(x, t) − V_ideal(t). A tolerance of 5 mV is common practice.',
    ],
  },
  trust: {
    title: 'Trust distance',
    words: [
      'Along each path from the soma to a tip, where the clamp error first leaves the tolerance; the shortest of them, interpolated between compartments.',
    ],
  },
  access: {
    title: 'Access error',
    words: [
      'What the access resistance costs at the pipette itself: pipette current times access resistance. The largest over the sweeps, with its sign.',
      "Ohm's law over the pipette. The estimate takes the steady current of the passive cell for the plan's largest step.",
    ],
  },
  bandwidth: {
    title: 'Clamp bandwidth',
    words: [
      `f = 1${thinSpace}/${thinSpace}(2π·R·C), with the access resistance and the capacitance of the whole cell.`,
      'One-pole circuit of access resistance and cell capacitance. An extended cell loads the pipette with less at high frequency, so this is a lower bound.',
    ],
  },
  numerical: {
    title: 'Numerical uncertainty',
    words: [
      'The change of the figure when compartment length and time step are halved, with the same sites. It is computed after the rehearsal; until then it reads pending.',
      'Says how far the arithmetic can be trusted. It says nothing about the model.',
    ],
  },
};
