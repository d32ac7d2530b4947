// The plan as one sentence: words and the fragments that can be changed. Pure; the plan line draws it.
import type { PipetteDocument, PipetteLetter, PlanDocument, Site } from '../../src-main/contract/documents.ts';
import type { CellDrawing } from '../../src-main/contract/results.ts';
import type { Area } from '../state/areas.ts';
import { mainLadder, withFirstRung, withLastRung, withRungCount, type MainLadder } from '../state/edits/ladder.ts';
import { withMode, withPipette, type Mode } from '../state/edits/pipette.ts';
import { numberWords, type ChangeWords } from '../state/edits/words.ts';
import { given, givenNumber, minus, thinSpace } from '../text/quantity.ts';
import { siteWords } from '../text/places.ts';

interface Owned {
  readonly key: string;
  /** Opens when the fragment is used. */
  readonly area: Area;
  /** What it is, for readers. */
  readonly label: string;
  /** Punctuation that must not be parted from it at a line's end. */
  readonly tail?: string;
}
export interface NumberFragment extends Owned {
  readonly kind: 'number';
  readonly value: number;
  readonly unit: string;
  /** As it reads in the sentence, unit included. */
  readonly words: string;
  readonly step: number;
  readonly least: number;
  readonly most: number;
  readonly isWhole: boolean;
  /** What the plan holds at this place. */
  readonly read: (plan: PlanDocument) => number;
  /** What undo will say, of what was typed and what became of it. */
  readonly undoWords: (typed: number) => ChangeWords;
  /** Of the plan as it stood when the edit began, not of what a half-typed number made of it. */
  readonly change: (plan: PlanDocument, value: number) => PlanDocument;
}
export interface ChoiceFragment extends Owned {
  readonly kind: 'choice';
  readonly words: string;
  readonly choices: readonly {
    readonly words: string;
    readonly isChosen: boolean;
    readonly undoWords: string;
    readonly change: (plan: PlanDocument) => PlanDocument;
  }[];
}
export interface SiteFragment extends Owned {
  readonly kind: 'site';
  readonly words: string;
  readonly letter: PipetteLetter;
  readonly site: Site;
}
export interface CellFragment extends Owned {
  readonly kind: 'cell';
  readonly words: string;
}
/** Only opens its area. */
export interface OpeningFragment extends Owned {
  readonly kind: 'opening';
  readonly words: string;
}
export type Fragment =
  | { readonly kind: 'words'; readonly words: string }
  | { readonly kind: 'letter'; readonly letter: PipetteLetter }
  | NumberFragment
  | ChoiceFragment
  | SiteFragment
  | CellFragment
  | OpeningFragment;

const say = (words: string): Fragment => ({ kind: 'words', words });

/** The sentence, in reading order. */
export function planSentence(plan: PlanDocument, drawing: CellDrawing | null): readonly Fragment[] {
  return glued([
    say('On '),
    { kind: 'cell', key: 'cell', area: 'Cell', label: 'Cell', words: plan.cell.name },
    say(', '),
    ...plan.rig.pipettes.flatMap((p, i) => [...(i > 0 ? [say(', and ')] : []), ...pipettePart(p, drawing)]),
    say('. '),
    ...protocolPart(plan),
    say(' at '),
    number({
      key: 'temperature',
      area: 'Cell',
      label: 'Temperature',
      value: plan.cell.surroundings.temperature_C,
      unit: '°C',
      least: 0,
      most: 50,
      undo: 'temperature',
      read: (p) => p.cell.surroundings.temperature_C,
      change: (p, temperature_C) => ({
        ...p,
        cell: { ...p.cell, surroundings: { ...p.cell.surroundings, temperature_C } },
      }),
    }),
    ...questionPart(plan),
    ...tolerancePart(plan),
    say('.'),
  ]);
}

/** Where nothing holds the voltage there is no clamp error to tolerate. */
function tolerancePart(plan: PlanDocument): readonly Fragment[] {
  if (!plan.rig.pipettes.some((p) => p.mode === 'voltage clamp')) return [];
  return [
    say(', held within '),
    number({
      key: 'tolerance',
      area: 'Forecast',
      label: 'Tolerance of clamp error',
      value: plan.tolerance.value,
      unit: plan.tolerance.unit,
      least: 0.01,
      most: 1000,
      undo: 'tolerance',
      read: (p) => p.tolerance.value,
      change: (p, value) => ({ ...p, tolerance: { ...p.tolerance, value } }),
    }),
  ];
}

/** Gives the stop or comma after a fragment to the fragment, so that no line begins with one. */
function glued(fragments: readonly Fragment[]): readonly Fragment[] {
  const whole: Fragment[] = [];
  for (const fragment of fragments) {
    const before = whole.at(-1);
    if (fragment.kind === 'words' && before?.kind === 'words') {
      whole[whole.length - 1] = say(before.words + fragment.words);
      continue;
    }
    const mark = fragment.kind === 'words' ? (/^[.,…]/.exec(fragment.words)?.[0] ?? '') : '';
    if (fragment.kind !== 'words' || mark === '' || before === undefined || !('key' in before)) {
      whole.push(fragment);
      continue;
    }
    whole[whole.length - 1] = { ...before, tail: mark };
    const rest = fragment.words.slice(mark.length);
    if (rest !== '') whole.push(say(rest));
  }
  return whole;
}

function pipettePart(p: PipetteDocument, drawing: CellDrawing | null): readonly Fragment[] {
  const { letter } = p;
  const modes: readonly Mode[] = ['voltage clamp', 'current clamp'];
  return [
    { kind: 'letter', letter },
    {
      kind: 'site',
      key: `site-${letter}`,
      area: 'Rig',
      label: `Site of pipette ${letter}`,
      words: siteWords(drawing, p.site),
      letter,
      site: p.site,
    },
    say(' in '),
    {
      kind: 'choice',
      key: `mode-${letter}`,
      area: 'Rig',
      label: `Mode of pipette ${letter}`,
      words: p.mode,
      choices: modes.map((mode) => ({
        words: mode,
        isChosen: mode === p.mode,
        undoWords: `${letter} to ${mode}, levels converted`,
        change: (plan) => withMode(plan, letter, mode, drawing?.inputResistance_MOhm ?? null),
      })),
    },
    say(' with '),
    number({
      key: `access-${letter}`,
      area: 'Rig',
      label: `Access resistance of pipette ${letter}`,
      value: p.accessResistance_MOhm,
      unit: 'MΩ',
      least: 0,
      most: 10_000,
      undo: `access resistance ${letter}`,
      read: (plan) => plan.rig.pipettes.find((x) => x.letter === letter)?.accessResistance_MOhm ?? 0,
      change: (plan, accessResistance_MOhm) => withPipette(plan, letter, { accessResistance_MOhm }),
    }),
    say(' access'),
  ];
}

function protocolPart(plan: PlanDocument): readonly Fragment[] {
  const main = mainLadder(plan);
  const sweeps = main === null ? plan.protocol.repeats : Math.max(...plan.protocol.ladders.map(rungCount));
  const owned = { area: 'Protocol' } as const;
  const hold = holdingPart(plan, main?.ladder.lane);
  if (main === null) {
    return [
      ...hold,
      { kind: 'opening', ...owned, key: 'protocol', label: 'Protocol', words: plan.protocol.name },
      say(sweeps === 1 ? ' once' : ` ${sweeps} times`),
    ];
  }
  const varies = main.ladder.number.endsWith('_ms') || main.ladder.number === 'rate_Hz';
  const verb = hold.length === 0 ? (varies ? 'Vary ' : 'Step ') : varies ? 'vary ' : 'step ';
  if (main.increment === null) {
    const words = `${givenNumber(main.first)}…${given(main.last, main.unit)}`;
    return [
      ...hold,
      say(verb),
      { kind: 'opening', ...owned, key: 'rungs', label: 'Ladder', words },
      say(' in '),
      { kind: 'opening', ...owned, key: 'sweeps', label: 'Sweeps', words: count(sweeps) },
    ];
  }
  return [...hold, say(verb), ...rungParts(main), say(' in '), sweepsPart(main)];
}

/** "Hold −70 mV, ": the level that the main ladder's lane sets out from. */
function holdingPart(plan: PlanDocument, letter: PipetteLetter | undefined): readonly Fragment[] {
  const lane = plan.protocol.lanes.find((l) => letter === undefined || l.pipette === letter);
  if (lane === undefined) return [];
  const of = (p: PlanDocument): number => p.protocol.lanes.find((l) => l.pipette === lane.pipette)?.holding ?? 0;
  return [
    say('Hold '),
    number({
      key: 'holding',
      area: 'Protocol',
      label: `Holding level of ${lane.pipette}`,
      value: lane.holding,
      unit: lane.unit,
      step: lane.unit === 'mV' ? 5 : 10,
      least: lane.unit === 'mV' ? -1000 : -1e6,
      most: lane.unit === 'mV' ? 1000 : 1e6,
      undo: `holding level of ${lane.pipette}`,
      read: of,
      change: (p, holding) => ({
        ...p,
        protocol: {
          ...p.protocol,
          lanes: p.protocol.lanes.map((l) => (l.pipette === lane.pipette ? { ...l, holding } : l)),
        },
      }),
    }),
    say(', '),
  ];
}

function rungParts(main: MainLadder): readonly Fragment[] {
  const step = Math.abs(main.increment ?? 1) || 1;
  const signed = (value: number): string => (value > 0 && main.unit === 'mV' ? '+' : '') + givenNumber(value);
  const common = { area: 'Protocol', unit: main.unit, least: -1e6, most: 1e6, step } as const;
  return [
    number({
      ...common,
      key: 'first',
      label: 'First rung of the ladder',
      value: main.first,
      words: signed(main.first),
      undo: 'first rung',
      read: (p) => mainLadder(p)?.first ?? 0,
      change: withFirstRung,
    }),
    say('…'),
    number({
      ...common,
      key: 'last',
      label: 'Last rung of the ladder',
      value: main.last,
      words: `${signed(main.last)}${thinSpace}${main.unit}`,
      undo: 'last rung',
      read: (p) => mainLadder(p)?.last ?? 0,
      change: withLastRung,
    }),
  ];
}

function sweepsPart(main: MainLadder): Fragment {
  return number({
    key: 'sweeps',
    area: 'Protocol',
    label: 'Sweeps',
    value: main.count,
    unit: '',
    words: count(main.count),
    least: 1,
    most: 10_000,
    isWhole: true,
    undo: 'sweeps',
    read: (p) => mainLadder(p)?.count ?? 1,
    change: withRungCount,
  });
}

function questionPart(plan: PlanDocument): readonly Fragment[] {
  const { readings } = plan.protocol;
  const question = plan.question;
  const owned = { key: 'reading', area: 'Protocol', label: 'Reading asked for' } as const;
  if (readings.length === 0) return [say(', '), { kind: 'opening', ...owned, words: 'with no reading' }];
  const asked = readings.find((r) => r.id === question?.reading);
  const choice: Fragment = {
    kind: 'choice',
    ...owned,
    words: asked?.name ?? 'nothing yet',
    choices: readings.map((r) => ({
      words: r.name,
      isChosen: r.id === question?.reading,
      undoWords: `ask for ${r.name}`,
      // 5 %: where most people begin to mind; common practice.
      change: (p) => ({ ...p, question: { reading: r.id, bias_percent: p.question?.bias_percent ?? 5 } }),
    })),
  };
  if (asked === undefined) return [say(' to read '), choice];
  return [
    say(' to read '),
    choice,
    say(' within '),
    number({
      key: 'bias',
      area: 'Protocol',
      label: 'Bias you can accept',
      value: question?.bias_percent ?? 5,
      unit: '%',
      least: 0.01,
      most: 1000,
      undo: 'bias accepted',
      read: (p) => p.question?.bias_percent ?? 0,
      change: (p, bias_percent) => (p.question === undefined ? p : { ...p, question: { ...p.question, bias_percent } }),
    }),
  ];
}

function number(
  f: Owned & {
    readonly value: number;
    readonly unit: string;
    readonly words?: string;
    readonly step?: number;
    readonly least: number;
    readonly most: number;
    readonly isWhole?: boolean;
    readonly undo: string;
    readonly read: (plan: PlanDocument) => number;
    readonly change: (plan: PlanDocument, value: number) => PlanDocument;
  },
): NumberFragment {
  const { undo, ...rest } = f;
  const { read } = f;
  return {
    kind: 'number',
    words: given(f.value, f.unit),
    step: 1,
    isWhole: false,
    ...rest,
    // Where rungs do not meet the number typed, both stand in the words.
    undoWords: (typed) => (before, after) =>
      numberWords(undo, f.unit, read)(before, after) +
      (read(after) === typed ? '' : `, nearest to ${givenNumber(typed)}`),
  };
}

function rungCount(ladder: PlanDocument['protocol']['ladders'][number]): number {
  return 'list' in ladder.rungs ? ladder.rungs.list.length : ladder.rungs.count;
}

function count(sweeps: number): string {
  return sweeps === 1 ? '1 sweep' : `${sweeps} sweeps`;
}

/** The sentence as plain text, for readers and the window's title. */
export function sentenceText(fragments: readonly Fragment[]): string {
  return fragments
    .map((f) => (f.kind === 'letter' ? `pipette ${f.letter} on ` : f.words + ('key' in f ? (f.tail ?? '') : '')))
    .join('')
    .replaceAll(minus, 'minus ');
}
