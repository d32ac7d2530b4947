// What a rehearsal was run with, in as few words as tell it from another of the same plan.
import type { ProtocolDocument, RigDocument } from '../../src-main/contract/documents.ts';
import { numberUnit, rungCount, rungValue, sweepCount } from '../protocol/ladder-rungs.ts';
import { given, givenNumber } from '../text/quantity.ts';

interface RanWith {
  readonly rig: RigDocument;
  readonly protocol: ProtocolDocument;
}

/** The access of every pipette: "12 MΩ", "A 12 MΩ, B 80 MΩ". */
export function accessWords({ rig }: RanWith): string {
  const { pipettes } = rig;
  return pipettes
    .map(
      ({ letter, accessResistance_MOhm: access }) => `${pipettes.length > 1 ? `${letter} ` : ''}${given(access, 'MΩ')}`,
    )
    .join(', ');
}

/** What the ladder goes through, else the levels of the steps: "−100…−60 mV". Empty where there is neither. */
export function levelWords({ protocol }: RanWith): string {
  const ladder = protocol.ladders.find(({ number }) => number === 'level') ?? protocol.ladders[0];
  if (ladder) {
    const unit = numberUnit(ladder.number, unitOfLane(protocol, ladder.lane));
    return span(rungValue(ladder, 0), rungValue(ladder, rungCount(ladder) - 1), unit);
  }
  for (const { unit, blocks } of protocol.lanes) {
    const levels = blocks.flatMap((block) => (block.kind === 'step' ? [block.level] : []));
    const [first, ...others] = levels;
    if (first !== undefined) return span(first, others.at(-1) ?? first, unit);
  }
  return '';
}

function unitOfLane(protocol: ProtocolDocument, letter: string): 'mV' | 'pA' {
  return protocol.lanes.find(({ pipette }) => pipette === letter)?.unit ?? 'mV';
}

function span(first: number, last: number, unit: string): string {
  return first === last ? given(first, unit) : `${givenNumber(first)}…${given(last, unit)}`;
}

/** "−100…−60 mV · 5 sweeps". */
export function sweepsWords(ran: RanWith): string {
  const sweeps = sweepCount(ran.protocol);
  const levels = levelWords(ran);
  return `${levels === '' ? '' : `${levels} · `}${sweeps} ${sweeps === 1 ? 'sweep' : 'sweeps'}`;
}
