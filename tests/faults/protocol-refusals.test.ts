// One fault at a time: what is wrong, where, and that all of them are told at once.
import { describe, expect, it } from 'vitest';
import type { Block, ProtocolDocument } from '../../src-main/contract/documents.ts';
import { layOut } from '../../src-main/protocol/sweeps.ts';
import { Refusal } from '../../src-main/units/refuse.ts';
import { clampProtocol, hold, step } from '../support/protocols.ts';

/** "code place" of every fault. */
function faultsOf(protocol: ProtocolDocument): string[] {
  try {
    layOut(protocol);
  } catch (error) {
    if (error instanceof Refusal) return error.all.map(({ code, place }) => `${code} ${place}`);
    throw error;
  }
  return [];
}

const family = [hold('before', 5), step('test', 10, -60), hold('after', 5)];
const train = (parts: Partial<Extract<Block, { kind: 'pulse train' }>>): Block => ({
  kind: 'pulse train',
  id: 'pulses',
  duration_ms: 100,
  level: 0,
  base: -70,
  width_ms: 2,
  rate_Hz: 50,
  count: 5,
  ...parts,
});
const ladder = (number: string, rungs: unknown, block = 'test', lane = 'A'): Record<string, unknown> => ({
  ladders: [{ lane, block, number, rungs }],
});
const window = (from: unknown, to: unknown, lane = 'A'): unknown => ({ lane, from, to });
const reading = (over: unknown, more: Record<string, unknown> = {}): Record<string, unknown> => ({
  readings: [{ id: 'r', name: 'reading', pipette: 'A', measure: 'mean', window: over, ...more }],
});

describe('a sound protocol', () => {
  it('is laid out', () => expect(faultsOf(clampProtocol(family))).toEqual([]));
  it('may have a single pulse wider than its period, which never comes again', () => {
    expect(faultsOf(clampProtocol([train({ count: 1, width_ms: 50, rate_Hz: 100 })]))).toEqual([]);
  });
  it('may fill its block with pulses to the last microsecond', () => {
    expect(faultsOf(clampProtocol([train({ width_ms: 20 })]))).toEqual([]);
  });
});

describe('is refused with its place', () => {
  const cases: [string, ProtocolDocument, string][] = [
    ['no length', clampProtocol([hold('h', 0)]), 'protocol-empty protocol.lanes'],
    [
      'no length in one rung',
      clampProtocol([step('test', 5, 0)], ladder('duration_ms', { list: [5, 0] })),
      'protocol-empty protocol.lanes',
    ],
    [
      'too many samples in a sweep',
      clampProtocol([hold('h', 50_000)], { sampling_us: 0.5, sweepInterval_ms: 60_000 }),
      'too-large protocol.sampling_us',
    ],
    [
      'too many samples in all',
      clampProtocol([hold('h', 10_000)], { sampling_us: 1, sweepInterval_ms: 60_000, repeats: 101 }),
      'too-large protocol',
    ],
    [
      'sampling slower than the sweep',
      clampProtocol([hold('h', 5)], { sampling_us: 6000 }),
      'quantity-out-of-range protocol.sampling_us',
    ],
    [
      'sweeps that overlap',
      clampProtocol(family, { sweepInterval_ms: 19.9 }),
      'quantity-out-of-range protocol.sweepInterval_ms',
    ],
    [
      'a block id used twice',
      clampProtocol([hold('h', 5), step('h', 5, 0)]),
      'name-twice protocol.lanes[0].blocks[1].id',
    ],
    [
      'a lane letter used twice',
      clampProtocol([], {
        lanes: [0, 1].map(() => ({ pipette: 'A', unit: 'mV', holding: 0, blocks: [hold('h', 5)] })),
      }),
      'name-twice protocol.lanes[1].pipette',
    ],
    [
      'overlapping pulses',
      clampProtocol([train({ width_ms: 20.1 })]),
      'quantity-out-of-range protocol.lanes[0].blocks[0].width_ms',
    ],
    [
      'a train longer than its block',
      clampProtocol([train({ count: 6, width_ms: 0.1 })]),
      'quantity-out-of-range protocol.lanes[0].blocks[0].duration_ms',
    ],
    [
      'a ladder on no lane',
      clampProtocol(family, ladder('level', { list: [0] }, 'test', 'B')),
      'name-unknown protocol.ladders[0].lane',
    ],
    [
      'a ladder on no block',
      clampProtocol(family, ladder('level', { list: [0] }, 'nothing')),
      'name-unknown protocol.ladders[0].block',
    ],
    [
      'a ladder on a number the block has not',
      clampProtocol(family, ladder('rate_Hz', { list: [5] })),
      'name-unknown protocol.ladders[0].number',
    ],
    [
      'two ladders on one number',
      clampProtocol(family, {
        ladders: [1, 2].map((v) => ({ lane: 'A', block: 'test', number: 'level', rungs: { list: [v] } })),
      }),
      'name-twice protocol.ladders[1]',
    ],
    [
      'a ladder to a negative duration',
      clampProtocol(family, ladder('duration_ms', { start: 10, increment: -5, count: 4 })),
      'quantity-out-of-range protocol.ladders[0].rungs',
    ],
    [
      'a ladder to half a pulse',
      clampProtocol([train({})], ladder('count', { list: [1, 2.5] }, 'pulses')),
      'quantity-out-of-range protocol.ladders[0].rungs',
    ],
    [
      'a ladder to no pulse width',
      clampProtocol([train({})], ladder('width_ms', { list: [1, 0] }, 'pulses')),
      'quantity-out-of-range protocol.ladders[0].rungs',
    ],
    [
      'a ladder to no rate',
      clampProtocol([train({})], ladder('rate_Hz', { list: [50, -1] }, 'pulses')),
      'quantity-out-of-range protocol.ladders[0].rungs',
    ],
    [
      'a window on no lane',
      clampProtocol(family, reading(window({ block: 'test', edge: 'start' }, { block: 'test', edge: 'end' }, 'B'))),
      'name-unknown protocol.readings[0].window.lane',
    ],
    [
      'a window on no block',
      clampProtocol(family, reading(window({ block: 'test', edge: 'start' }, { block: 'nothing', edge: 'end' }))),
      'name-unknown protocol.readings[0].window.to.block',
    ],
    [
      'a window before the sweep',
      clampProtocol(
        family,
        reading(window({ block: 'before', edge: 'start', offset_ms: -0.001 }, { block: 'test', edge: 'end' })),
      ),
      'window-outside-sweep protocol.readings[0].window',
    ],
    [
      'a window after the sweep',
      clampProtocol(
        family,
        reading(window({ block: 'test', edge: 'start' }, { block: 'after', edge: 'end', offset_ms: 0.001 })),
      ),
      'window-outside-sweep protocol.readings[0].window',
    ],
    [
      'a window that runs backwards',
      clampProtocol(family, reading(window({ block: 'test', edge: 'end' }, { block: 'test', edge: 'start' }))),
      'window-outside-sweep protocol.readings[0].window',
    ],
    [
      'a baseline that a ladder drives out of the sweep',
      clampProtocol(family, {
        ...reading(window({ block: 'test', edge: 'start' }, { block: 'test', edge: 'end' }), {
          baseline: window({ block: 'test', edge: 'start', offset_ms: -4 }, { block: 'test', edge: 'start' }),
        }),
        ...ladder('duration_ms', { list: [5, 3] }, 'before'),
      }),
      'window-outside-sweep protocol.readings[0].baseline',
    ],
    [
      'a reading of a pipette without a lane',
      clampProtocol(
        family,
        reading(window({ block: 'test', edge: 'start' }, { block: 'test', edge: 'end' }), { pipette: 'B' }),
      ),
      'name-unknown protocol.readings[0].pipette',
    ],
  ];
  it.each(cases)('%s', (_, protocol, fault) => expect(faultsOf(protocol)).toEqual([fault]));
});

describe('refusals', () => {
  it('tell every fault, not just the first', () => {
    const protocol = clampProtocol([hold('h', 5), step('h', 5, 0), train({ width_ms: 30, count: 2 })], {
      ...ladder('level', { list: [1] }, 'nothing'),
      ...reading(window({ block: 'gone', edge: 'start' }, { block: 'h', edge: 'end' }), { pipette: 'B' }),
    });
    expect(faultsOf(protocol).toSorted()).toEqual([
      'name-twice protocol.lanes[0].blocks[1].id',
      'name-unknown protocol.ladders[0].block',
      'name-unknown protocol.readings[0].pipette',
      'name-unknown protocol.readings[0].window.from.block',
      'quantity-out-of-range protocol.lanes[0].blocks[2].width_ms',
    ]);
  });

  it('name the sweep, the number and the way out', () => {
    const protocol = clampProtocol(family, ladder('duration_ms', { start: 10, increment: -5, count: 4 }));
    expect(() => layOut(protocol)).toThrow(
      expect.objectContaining({
        data: expect.objectContaining({ value: '-5 ms in sweep 4', remedy: 'keep every rung at 0 or above' }),
      }),
    );
  });
});
