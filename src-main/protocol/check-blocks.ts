import type { Block, Ladder, ProtocolDocument } from '../contract/documents.ts';
import { pulsesOverlap, pulseTrainLength } from './blocks/pulse-train.ts';
import type { Faults } from './faults.ts';
import { blockInRung, rungsOf } from './ladder.ts';
import { ticksOfMs } from './ticks.ts';

/** What is wrong with blocks as written, and as the ladders leave them; each fault once, at its first sweep. */
export function blockFaults(protocol: ProtocolDocument, faults: Faults): void {
  const rungs = rungsOf(protocol);
  protocol.lanes.forEach((lane, l) => {
    lane.blocks.forEach((given, b) => {
      const onBlock = (ladder: Ladder): boolean => ladder.lane === lane.pipette && ladder.block === given.id;
      const laddered = protocol.ladders.some(onBlock);
      const seen = new Set<string>();
      for (let rung = 0; rung < (laddered ? rungs : 1); rung += 1) {
        const block = blockInRung(given, lane.pipette, protocol.ladders, rung);
        for (const fault of faultsOf(block).filter(({ field }) => !seen.has(field))) {
          seen.add(fault.field);
          const cause = protocol.ladders.findIndex((ladder) => onBlock(ladder) && ladder.number === fault.field);
          faults.add('quantity-out-of-range', {
            thing: fault.thing,
            place:
              cause === -1 ? `protocol.lanes[${l}].blocks[${b}].${fault.field}` : `protocol.ladders[${cause}].rungs`,
            value: laddered ? `${fault.value} in sweep ${rung + 1}` : fault.value,
            remedy: fault.remedy,
          });
        }
      }
    });
  });
}

interface BlockFault {
  readonly field: string;
  readonly thing: string;
  readonly value: string;
  readonly remedy: string;
}

function faultsOf(block: Block): BlockFault[] {
  const found: BlockFault[] = [];
  if (!(block.duration_ms >= 0 && Number.isFinite(block.duration_ms))) {
    const value = `${block.duration_ms} ms`;
    found.push({ field: 'duration_ms', thing: 'duration', value, remedy: 'keep every rung at 0 or above' });
  }
  if (block.kind !== 'pulse train') return found;
  if (!(block.width_ms > 0)) {
    const value = `${block.width_ms} ms`;
    found.push({ field: 'width_ms', thing: 'pulse width', value, remedy: 'keep every rung above 0' });
  }
  if (!(block.rate_Hz > 0)) {
    found.push({ field: 'rate_Hz', thing: 'rate', value: `${block.rate_Hz} Hz`, remedy: 'keep every rung above 0' });
  }
  if (!Number.isInteger(block.count) || block.count < 1 || block.count > 100_000) {
    const remedy = 'keep every rung a whole number from 1 to 100000';
    found.push({ field: 'count', thing: 'number of pulses', value: `${block.count}`, remedy });
  }
  return found.length > 0 ? found : trainFaults(block);
}

function trainFaults(train: Extract<Block, { kind: 'pulse train' }>): BlockFault[] {
  const pulses = `${train.count} × ${train.width_ms} ms at ${train.rate_Hz} Hz`;
  if (pulsesOverlap(train)) {
    const remedy = `give a width of at most ${1000 / train.rate_Hz} ms or a lower rate`;
    return [{ field: 'width_ms', thing: 'pulse train with overlapping pulses', value: pulses, remedy }];
  }
  if (pulseTrainLength(train) > ticksOfMs(train.duration_ms)) {
    const need = ((train.count - 1) * 1000) / train.rate_Hz + train.width_ms;
    const remedy = `give the block at least ${need} ms or fewer pulses`;
    return [{ field: 'duration_ms', thing: 'pulse train longer than its block', value: pulses, remedy }];
  }
  return [];
}
