import type { ProtocolDocument } from '../contract/documents.ts';
import type { Faults } from './faults.ts';
import { hasNumber, ladderNumbers } from './ladder.ts';

/** Ladders that point at nothing, or two that pull at the same number. */
export function ladderFaults(protocol: ProtocolDocument, faults: Faults): void {
  protocol.ladders.forEach((ladder, i) => {
    const place = `protocol.ladders[${i}]`;
    const lane = protocol.lanes.find((candidate) => candidate.pipette === ladder.lane);
    if (lane === undefined) {
      const known = protocol.lanes.map((candidate) => candidate.pipette).join(', ');
      const remedy = `name a lane of the protocol: ${known}`;
      faults.add('name-unknown', { thing: 'lane of the ladder', place: `${place}.lane`, value: ladder.lane, remedy });
      return;
    }
    const block = lane.blocks.find((candidate) => candidate.id === ladder.block);
    if (block === undefined) {
      const remedy = `name a block of lane ${lane.pipette}: ${lane.blocks.map(({ id }) => id).join(', ')}`;
      faults.add('name-unknown', {
        thing: 'block of the ladder',
        place: `${place}.block`,
        value: ladder.block,
        remedy,
      });
      return;
    }
    if (!hasNumber(block.kind, ladder.number)) {
      const remedy = `a ${block.kind} has ${ladderNumbers[block.kind].join(', ')}`;
      const place_ = `${place}.number`;
      faults.add('name-unknown', { thing: 'number of the ladder', place: place_, value: ladder.number, remedy });
    }
    const first = protocol.ladders.findIndex(
      (other) => other.lane === ladder.lane && other.block === ladder.block && other.number === ladder.number,
    );
    if (first !== i) {
      const value = `${ladder.number} of block ${ladder.block}, also changed by protocol.ladders[${first}]`;
      faults.add('name-twice', { thing: 'ladder', place, value, remedy: 'keep one ladder for each number' });
    }
  });
}
