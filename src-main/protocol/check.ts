// Everything that can be wrong with a protocol, looked for in one go. Places are JSON paths from "protocol".
import type { ProtocolDocument } from '../contract/documents.ts';
import { blockFaults } from './check-blocks.ts';
import { ladderFaults } from './check-ladders.ts';
import { windowFaults } from './check-windows.ts';
import { Faults } from './faults.ts';
import { longestLane, rungBlocks, type LaidBlock } from './lane.ts';
import { rungsOf } from './ladder.ts';
import {
  mostBlocksInAll,
  mostPulsesPerSweep,
  mostSamplesInAll,
  mostSamplesPerSweep,
  mostSweeps,
  sampleCount,
} from './sampling.ts';
import { msOf, ticksOfMs, ticksOfUs, type Tick } from './ticks.ts';

/** @throws Refusal with every fault of the protocol. */
export function refuseFaults(protocol: ProtocolDocument): void {
  const faults = new Faults();
  countFaults(protocol, faults);
  // The checks below look at every block in every rung.
  faults.settle();
  nameFaults(protocol, faults);
  ladderFaults(protocol, faults);
  blockFaults(protocol, faults);
  // Lengths mean nothing while blocks are wrong: one negative duration would be reported at every window.
  const sound = faults.count === 0;
  if (sound) lengthFaults(protocol, faults);
  const windows = protocol.readings.flatMap(({ window, baseline }, r) => {
    const place = `protocol.readings[${r}]`;
    const over = { window, place: `${place}.window` };
    return baseline ? [over, { window: baseline, place: `${place}.baseline` }] : [over];
  });
  windowFaults(protocol, windows, faults, sound);
  faults.settle();
}

/** More sweeps or blocks than can be laid out. */
function countFaults(protocol: ProtocolDocument, faults: Faults): void {
  const rungs = rungsOf(protocol);
  const sweeps = rungs * protocol.repeats;
  if (sweeps > mostSweeps) {
    const value = `${sweeps} sweeps, at most ${mostSweeps}`;
    const remedy = 'take fewer rungs or repeats';
    faults.add('too-large', { thing: 'number of sweeps', place: 'protocol', value, remedy });
  }
  const blocks = rungs * protocol.lanes.reduce((sum, lane) => sum + lane.blocks.length, 0);
  if (blocks > mostBlocksInAll) {
    const value = `${blocks} blocks in all sweeps, at most ${mostBlocksInAll}`;
    const remedy = 'take fewer rungs or blocks; a pulse train is one block';
    faults.add('too-large', { thing: 'number of blocks', place: 'protocol', value, remedy });
  }
}

function nameFaults(protocol: ProtocolDocument, faults: Faults): void {
  protocol.lanes.forEach((lane, l) => {
    twice(protocol.lanes, l, (other) => other.pipette, 'lane of pipette', `protocol.lanes[${l}].pipette`, faults);
    lane.blocks.forEach((_, b) => {
      twice(lane.blocks, b, (other) => other.id, 'block', `protocol.lanes[${l}].blocks[${b}].id`, faults);
    });
  });
  const letters = protocol.lanes.map((lane) => lane.pipette);
  protocol.readings.forEach((reading, r) => {
    twice(protocol.readings, r, (other) => other.id, 'reading', `protocol.readings[${r}].id`, faults);
    if (letters.includes(reading.pipette)) return;
    faults.add('name-unknown', {
      thing: 'pipette of the reading',
      place: `protocol.readings[${r}].pipette`,
      value: reading.pipette,
      remedy: `name a pipette that has a lane: ${letters.join(', ')}`,
    });
  });
}

function twice<T>(
  list: readonly T[],
  index: number,
  key: (item: T) => string,
  thing: string,
  place: string,
  faults: Faults,
): void {
  const item = list[index];
  if (item === undefined || list.findIndex((other) => key(other) === key(item)) === index) return;
  faults.add('name-twice', { thing, place, value: key(item), remedy: 'give each its own name' });
}

function lengthFaults(protocol: ProtocolDocument, faults: Faults): void {
  const interval = ticksOfUs(protocol.sampling_us);
  let pulses = 0;
  const lengths = Array.from({ length: rungsOf(protocol) }, (_, rung) => {
    const lanes = rungBlocks(protocol, rung);
    pulses = Math.max(pulses, pulsesIn(lanes));
    return longestLane(lanes);
  });
  const longest = lengths.reduce((a, b) => Math.max(a, b), 0);
  emptyFaults(lengths, faults);
  if (longest > 0 && interval > longest) {
    faults.add('quantity-out-of-range', {
      thing: 'sampling interval',
      place: 'protocol.sampling_us',
      value: `${protocol.sampling_us} µs`,
      remedy: `give at most the sweep's length, ${msOf(longest)} ms`,
    });
  }
  if (longest > ticksOfMs(protocol.sweepInterval_ms)) {
    faults.add('quantity-out-of-range', {
      thing: 'interval from sweep start to sweep start',
      place: 'protocol.sweepInterval_ms',
      value: `${protocol.sweepInterval_ms} ms`,
      remedy: `give at least the longest sweep, ${msOf(longest)} ms`,
    });
  }
  if (pulses > mostPulsesPerSweep) {
    const value = `${pulses} pulses in one sweep, at most ${mostPulsesPerSweep}`;
    faults.add('too-large', { thing: 'sweep', place: 'protocol.lanes', value, remedy: 'give the trains fewer pulses' });
  }
  sizeFaults(protocol, lengths, interval, faults);
}

function pulsesIn(lanes: readonly (readonly LaidBlock[])[]): number {
  let pulses = 0;
  for (const blocks of lanes) for (const { block } of blocks) if (block.kind === 'pulse train') pulses += block.count;
  return pulses;
}

function emptyFaults(lengths: readonly Tick[], faults: Faults): void {
  const empty = lengths.indexOf(0);
  if (empty === -1) return;
  faults.add('protocol-empty', {
    thing: 'length of the protocol',
    place: 'protocol.lanes',
    value: lengths.length > 1 ? `0 ms in sweep ${empty + 1}` : '0 ms',
    remedy: 'give at least one block a duration above 0',
  });
}

function sizeFaults(protocol: ProtocolDocument, lengths: readonly Tick[], interval: Tick, faults: Faults): void {
  const samples = lengths.map((length) => sampleCount(length, interval));
  const most = samples.reduce((a, b) => Math.max(a, b), 0);
  const all = samples.reduce((sum, n) => sum + n, 0) * protocol.repeats;
  const remedy = 'sample more coarsely, shorten the blocks or take fewer sweeps';
  if (most > mostSamplesPerSweep) {
    const value = `${most} samples in one sweep, at most ${mostSamplesPerSweep}`;
    faults.add('too-large', { thing: 'sweep', place: 'protocol.sampling_us', value, remedy });
  } else if (all > mostSamplesInAll) {
    const value = `${all} samples in all sweeps, at most ${mostSamplesInAll}`;
    faults.add('too-large', { thing: 'protocol', place: 'protocol', value, remedy });
  }
}
