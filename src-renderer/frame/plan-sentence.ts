// The plan as one sentence: words and the fragments that can be changed. Pure; the plan line draws it.
import type { PipetteDocument, PipetteLetter, PlanDocument, Site } from '../../src-main/contract/documents.ts';
import type { CellDrawing } from '../../src-main/contract/results.ts';
import type { Area } from '../state/area.svelte.ts';
import { mainLadder, withFirstRung, withLastRung, withRungCount, type MainLadder } from '../state/edits/ladder.ts';
import { withMode, withPipette, type Mode } from '../state/edits/pipette.ts';
import { numberWords } from '../state/edits/words.ts';
import type { ChangeWords } from '../state/plan.svelte.ts';
import { given, givenNumber, minus, thinSpace } from '../text/quantity.ts';
import { siteWords } from '../text/places.ts';

interface Owned {
  readonly key: string;
  /** Opens when the fragment is used. */
  readonly area: Area;
  /** What it is, for readers. */
  readonly label: string;
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
  readonly undoWords: ChangeWords;
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
  return [
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
    say('.'),
  ];
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
  if (main === null) {
    return [
      { kind: 'opening', ...owned, key: 'protocol', label: 'Protocol', words: plan.protocol.name },
      say(sweeps === 1 ? ' once' : ` ${sweeps} times`),
    ];
  }
  const verb = main.ladder.number.endsWith('_ms') || main.ladder.number === 'rate_Hz' ? 'Vary ' : 'Step ';
  if (main.increment === null) {
    const words = `${givenNumber(main.first)}…${given(main.last, main.unit)}`;
    return [
      say(verb),
      { kind: 'opening', ...owned, key: 'rungs', label: 'Ladder', words },
      say(' in '),
      { kind: 'opening', ...owned, key: 'sweeps', label: 'Sweeps', words: count(sweeps) },
    ];
  }
  return [say(verb), ...rungParts(main), say(' in '), sweepsPart(main)];
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
  const { undo, read, ...rest } = f;
  return {
    kind: 'number',
    words: given(f.value, f.unit),
    step: 1,
    isWhole: false,
    ...rest,
    undoWords: numberWords(undo, f.unit, read),
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
    .map((f) => (f.kind === 'letter' ? `pipette ${f.letter} on ` : f.words))
    .join('')
    .replaceAll(minus, 'minus ');
}
