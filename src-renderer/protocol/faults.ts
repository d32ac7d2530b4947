import type { PipetteLetter, ProtocolDocument } from '../../src-main/contract/documents.ts';
import type { RefusalData } from '../../src-main/contract/refusal.ts';

/** What a refusal's place points at in the protocol; "rest" is anything else. */
export type Target =
  | { readonly kind: 'block'; readonly lane: PipetteLetter; readonly block: string }
  | { readonly kind: 'ladder'; readonly lane: PipetteLetter; readonly block: string }
  | { readonly kind: 'reading'; readonly reading: string }
  | { readonly kind: 'rest' };

/** Reads a JSON path such as "protocol.lanes[0].blocks[2].level". */
export function targetOf(place: string, protocol: ProtocolDocument): Target {
  const index = (name: string): number => Number(new RegExp(`${name}\\[(\\d+)\\]`).exec(place)?.[1] ?? NaN);
  const lane = protocol.lanes[index('lanes')];
  const block = lane?.blocks[index('blocks')];
  if (lane && block) return { kind: 'block', lane: lane.pipette, block: block.id };
  const ladder = protocol.ladders[index('ladders')];
  if (ladder) return { kind: 'ladder', lane: ladder.lane, block: ladder.block };
  const reading = protocol.readings[index('readings')];
  return reading ? { kind: 'reading', reading: reading.id } : { kind: 'rest' };
}

/** Refusals about one block, its ladders included. */
export function blockRefusals(
  refusals: readonly RefusalData[],
  protocol: ProtocolDocument,
  lane: PipetteLetter,
  block: string,
): RefusalData[] {
  return refusals.filter((refusal) => {
    const target = targetOf(refusal.place, protocol);
    return (target.kind === 'block' || target.kind === 'ladder') && target.lane === lane && target.block === block;
  });
}

export function readingRefusals(
  refusals: readonly RefusalData[],
  protocol: ProtocolDocument,
  id: string,
): RefusalData[] {
  return refusals.filter((refusal) => {
    const target = targetOf(refusal.place, protocol);
    return target.kind === 'reading' && target.reading === id;
  });
}

/** Refusals that belong to no block and no reading. */
export function otherRefusals(refusals: readonly RefusalData[], protocol: ProtocolDocument): RefusalData[] {
  return refusals.filter((refusal) => targetOf(refusal.place, protocol).kind === 'rest');
}

/** One sentence: what, how it stands, what to do. */
export function refusalWords(refusal: RefusalData): string {
  return `${refusal.thing} is ${refusal.value}: ${refusal.remedy}.`;
}
