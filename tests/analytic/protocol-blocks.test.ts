// Closed forms: the definition of each block, sample by sample.
import { describe, expect, it } from 'vitest';
import { sampledCommand } from '../../src-main/protocol/command-course.ts';
import type { Block, ProtocolDocument } from '../../src-main/contract/documents.ts';
import { layOut } from '../../src-main/protocol/sweeps.ts';
import { clampProtocol, hold, ramp, step } from '../support/protocols.ts';

/** The command of lane A in mV at every sample. */
function commandOf(protocol: ProtocolDocument, sweep = 0): number[] {
  const laid = layOut(protocol);
  const { lanes, samples } = laid.sweep(sweep);
  return [...sampledCommand(lanes[0]!.command, laid.sampling, samples)].map((V) => V * 1e3);
}

/** mV; one rounding each way. */
const rounding = 1e-12;

describe('blocks, sample by sample', () => {
  it('a hold stays at the holding level', () => {
    const command = commandOf(clampProtocol([hold('h', 3)]));
    expect(command).toHaveLength(151); // 0 to 3 ms by 20 µs, both ends
    for (const level of command) expect(level).toBeCloseTo(-70, 12);
  });

  it('a step is at its level from its first sample, and the sample on its end is already the next block', () => {
    const command = commandOf(clampProtocol([hold('h', 1), step('s', 2, 15), hold('t', 1)]));
    command.forEach((level, i) => expect(level).toBeCloseTo(i >= 50 && i < 150 ? 15 : -70, 12));
  });

  it('a ramp is from + (to − from)·t/duration', () => {
    const command = commandOf(clampProtocol([hold('h', 0.5), ramp('r', 7, -90, 37)]));
    for (let i = 25; i <= 375; i += 1) {
      const t = i * 0.02 - 0.5;
      expect(Math.abs(command[i]! - (-90 + (127 * t) / 7))).toBeLessThan(1e-11);
    }
  });

  it('a pulse train puts pulse k at k/rate and the base level between and after', () => {
    const train: Block = {
      kind: 'pulse train',
      id: 'p',
      duration_ms: 50,
      level: 20,
      base: -60,
      width_ms: 3,
      rate_Hz: 80,
      count: 3,
    };
    const command = commandOf(clampProtocol([train, hold('h', 1)]));
    command.forEach((level, i) => {
      const us = i * 20;
      const inPulse = [0, 12_500, 25_000].some((onset) => us >= onset && us < onset + 3000);
      expect(Math.abs(level - (us >= 50_000 ? -70 : inPulse ? 20 : -60)), `sample ${i}`).toBeLessThan(rounding);
    });
  });

  it('pulses that touch make one level without a gap', () => {
    const train: Block = {
      kind: 'pulse train',
      id: 'p',
      duration_ms: 40,
      level: 5,
      base: -60,
      width_ms: 10,
      rate_Hz: 100,
      count: 4,
    };
    const { lanes } = layOut(clampProtocol([train])).sweep(0);
    expect(lanes[0]!.command).toEqual([{ start: 0, end: 0.04, v0: 0.005, v1: 0.005 }]);
  });

  it('keeps an edge that is on no sample exactly where it was put', () => {
    const { lanes } = layOut(clampProtocol([hold('h', 1.0137), step('s', 2, 0)])).sweep(0);
    expect(lanes[0]!.command[1]!.start).toBe(1.0137e-3);
  });

  it('shorter lanes hold at their own level to the end of the longest', () => {
    const protocol = clampProtocol([], {
      lanes: [
        { pipette: 'A', unit: 'mV', holding: -70, blocks: [step('s', 2, 0)] },
        { pipette: 'B', unit: 'pA', holding: 30, blocks: [{ kind: 'step', id: 'i', duration_ms: 5, level: 100 }] },
      ],
    });
    const { lanes, duration } = layOut(protocol).sweep(0);
    expect(duration).toBe(0.005);
    expect(lanes[0]!.command.at(-1)).toEqual({ start: 0.002, end: 0.005, v0: -0.07, v1: -0.07 });
    expect(lanes[1]!.holding).toBe(3e-11);
    expect(lanes[1]!.command).toEqual([{ start: 0, end: 0.005, v0: 1e-10, v1: 1e-10 }]);
  });

  it('a block of no length leaves no piece and no jump', () => {
    const { lanes } = layOut(clampProtocol([hold('h', 1), step('s', 0, 40), hold('t', 1)])).sweep(0);
    expect(lanes[0]!.command).toHaveLength(1);
  });
});
