// Arithmetic of time: exact rational edges against the ones laid out, over ten million samples.
import { describe, expect, it } from 'vitest';
import type { Block } from '../../src-main/contract/documents.ts';
import { layOut } from '../../src-main/protocol/sweeps.ts';
import { timelineOf, timeOfStep } from '../../src-main/solver/timeline.ts';
import { clampProtocol, hold, step } from '../support/protocols.ts';

describe('time does not drift', () => {
  it('sample 10⁷ at 33.3 µs stands at 333 s to the last bit or the one beside it', () => {
    const { sampling } = layOut(clampProtocol([hold('h', 1)], { sampling_us: 33.3 }));
    const timeline = timelineOf({
      duration: 400,
      sampling,
      step: sampling / 2,
      commands: [],
      extraTimes: new Float64Array(),
    });
    for (const [sample, time] of [
      [10_000_000, 333],
      [9_999_999, 332.9999667],
    ] as const) {
      // A product and a quotient: two roundings of half a unit of the last place each, 2⁻⁴⁴ s here.
      expect(Math.abs(timeOfStep(timeline, 2 * sample) - time)).toBeLessThanOrEqual(2 ** -44);
    }
  });

  it('a thousand blocks of 0.1 ms end at 100 ms to the last bit', () => {
    const blocks = Array.from({ length: 1000 }, (_, i) => step(`b${i}`, 0.1, i % 2));
    const { lanes, duration } = layOut(clampProtocol(blocks)).sweep(0);
    expect(duration).toBe(0.1);
    // Adding 0.1 a thousand times in doubles ends at 99.9999999999986 ms.
    lanes[0]!.blocks.forEach(({ end }, i) => expect(end).toBe((i + 1) / 10_000));
  });

  it('the last of 100000 pulses at 3 Hz starts within half a picosecond of 99999/3 s', () => {
    const train: Block = {
      kind: 'pulse train',
      id: 'p',
      duration_ms: 33_334_000,
      level: 0,
      base: -70,
      width_ms: 1,
      rate_Hz: 3,
      count: 100_000,
    };
    const { lanes } = layOut(clampProtocol([train], { sampling_us: 1000, sweepInterval_ms: 4e7 })).sweep(0);
    const pulses = lanes[0]!.command.filter(({ v0 }) => v0 === 0);
    expect(pulses).toHaveLength(100_000);
    // 33333 s is 2^15 s: a double there has steps of 7 ps.
    for (const k of [1, 2, 99_998, 99_999]) expect(Math.abs(pulses[k]!.start - k / 3)).toBeLessThan(8e-12);
  });

  it('a sweep has no sample that its steps do not come to', () => {
    // Five nanoseconds short of three intervals of 10 ms, in steps of 10 µs: half a thousandth of a step.
    const given = { sampling: 0.01, step: 1e-5, commands: [], extraTimes: new Float64Array() };
    expect(timelineOf({ ...given, duration: 0.03 - 5e-9 }).samples).toBe(3);
    expect(timelineOf({ ...given, duration: 0.03 }).samples).toBe(4);
    // Rounding of an end is no shortage: a picosecond.
    expect(timelineOf({ ...given, duration: 0.03 - 1e-12 }).samples).toBe(4);
  });

  it('the number of samples is right where the quotient of doubles is not', () => {
    // 0.3 ms / 0.1 ms is 2.9999999999999996 in doubles.
    const laid = layOut(clampProtocol([hold('h', 0.3)], { sampling_us: 100 }));
    expect(laid.sweep(0).samples).toBe(4);
  });
});
