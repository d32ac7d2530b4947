// Everything that can be wrong with a protocol, looked for in one go. Places are JSON paths from "protocol".
import type { ProtocolDocument } from '../contract/documents.ts';
import { blockFaults } from './check-blocks.ts';
import { ladderFaults } from './check-ladders.ts';
import { windowFaults } from './check-windows.ts';
import { Faults } from './faults.ts';
import { longestLane, rungBlocks } from './lane.ts';
import { rungsOf } from './ladder.ts';
import { mostSamplesInAll, mostSamplesPerSweep, sampleCount } from './sampling.ts';
import { msOf, ticksOfMs, ticksOfUs, type Tick } from './ticks.ts';

/** @throws Refusal with every fault of the protocol. */
export function refuseFaults(protocol: ProtocolDocument): void {
  const faults = new Faults();
  nameFaults(protocol, faults);
  ladderFaults(protocol, faults);
  blockFaults(protocol, faults);
  // Lengths mean nothing while blocks are wrong: one negative duration would be reported at every window.
  const sound = faults.count === 0;
  if (sound) lengthFaults(protocol, faults);
  protocol.readings.forEach((reading, r) => {
    const place = `protocol.readings[${r}]`;
    windowFaults(protocol, reading.window, `${place}.window`, faults, sound);
    if (reading.baseline) windowFaults(protocol, reading.baseline, `${place}.baseline`, faults, sound);
  });
  faults.settle();
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
  const lengths = Array.from({ length: rungsOf(protocol) }, (_, rung) => longestLane(rungBlocks(protocol, rung)));
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
  sizeFaults(protocol, lengths, interval, faults);
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
  }
  if (all > mostSamplesInAll) {
    const value = `${all} samples in all sweeps, at most ${mostSamplesInAll}`;
    faults.add('too-large', { thing: 'protocol', place: 'protocol', value, remedy });
  }
}
