import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { layOut } from '../../src-main/protocol/sweeps.ts';
import { resolveWindow } from '../../src-main/protocol/window.ts';
import type { Window } from '../../src-main/contract/documents.ts';
import { clampProtocol, hold, step } from '../support/protocols.ts';

const family = [hold('before', 5), step('test', 10, -60), hold('after', 5)];

describe('ladders', () => {
  it('start + increment·k, exact in decimals', () => {
    const ladders = [{ lane: 'A', block: 'test', number: 'level', rungs: { start: -80, increment: 0.1, count: 1000 } }];
    const laid = layOut(clampProtocol(family, { ladders }));
    expect(laid.count).toBe(1000);
    for (const k of [0, 3, 7, 999]) {
      const sweep = laid.sweep(k);
      expect(sweep.ladderValue).toBe(Number((-80 + k / 10).toFixed(1)));
      expect(sweep.lanes[0]!.command[1]!.v0).toBe(sweep.ladderValue / 1000);
    }
  });

  it('all run in step; the longest sets the count and a shorter one stays on its last rung', () => {
    const ladders = [
      { lane: 'A', block: 'test', number: 'level', rungs: { list: [-80, -40, 0, 40] } },
      { lane: 'A', block: 'before', number: 'duration_ms', rungs: { list: [5, 1] } },
    ];
    const laid = layOut(clampProtocol(family, { ladders }));
    const values = Array.from({ length: laid.count }, (_, i) => laid.sweep(i).ladderValues);
    expect(values).toEqual([
      [-80, 5],
      [-40, 1],
      [0, 1],
      [40, 1],
    ]);
    expect(laid.sweep(3).lanes[0]!.blocks[1]!.start).toBe(0.001);
  });

  it('repeats go through the whole family again', () => {
    const ladders = [{ lane: 'A', block: 'test', number: 'level', rungs: { list: [-80, 0, 40] } }];
    const laid = layOut(clampProtocol(family, { ladders, repeats: 2 }));
    expect(Array.from({ length: laid.count }, (_, i) => laid.sweep(i).ladderValue)).toEqual([-80, 0, 40, -80, 0, 40]);
  });

  it('without a ladder the ladder value is NaN and repeats set the count', () => {
    const laid = layOut(clampProtocol(family, { repeats: 3 }));
    expect(laid.count).toBe(3);
    expect(laid.sweep(2).ladderValue).toBeNaN();
  });

  it('windows follow the blocks that ladders move', () => {
    const window: Window = {
      lane: 'A',
      from: { block: 'test', edge: 'start', offset_ms: 1 },
      to: { block: 'test', edge: 'end', offset_ms: -2 },
    };
    const ladders = [{ lane: 'A', block: 'before', number: 'duration_ms', rungs: { list: [5, 12.5] } }];
    const laid = layOut(clampProtocol(family, { ladders }));
    expect(resolveWindow(window, laid.sweep(0))).toEqual({ from: 0.006, to: 0.013 });
    expect(resolveWindow(window, laid.sweep(1))).toEqual({ from: 0.0135, to: 0.0205 });
  });
});

describe('any protocol', () => {
  const duration = fc.integer({ min: 0, max: 50_000 }).map((us) => us / 1000);
  const blocks = fc
    .array(fc.record({ kind: fc.constantFrom('hold', 'step', 'ramp'), duration_ms: duration }), { minLength: 1 })
    .map((list) =>
      list.map(({ kind, duration_ms }, i) => {
        const id = `b${i}`;
        if (kind === 'hold') return hold(id, duration_ms);
        return kind === 'step'
          ? step(id, duration_ms, i)
          : ({ kind: 'ramp', id, duration_ms, from: -i, to: 2 * i } as const);
      }),
    )
    .filter((list) => list.some(({ duration_ms }) => duration_ms > 0.02));

  it('is covered by its pieces from 0 to its end without gap or overlap', () => {
    fc.assert(
      fc.property(blocks, (list) => {
        const { lanes, duration: end } = layOut(clampProtocol(list, { sweepInterval_ms: 1e6 })).sweep(0);
        const pieces = lanes[0]!.command;
        expect(pieces[0]!.start).toBe(0);
        expect(pieces.at(-1)!.end).toBe(end);
        pieces.slice(1).forEach((piece, p) => expect(piece.start).toBe(pieces[p]!.end));
        for (const piece of pieces) expect(piece.end).toBeGreaterThan(piece.start);
      }),
      { seed: 20240601 },
    );
  });

  it('is the same when a step is cut in two', () => {
    fc.assert(
      fc.property(fc.integer({ min: 21, max: 9979 }), (us) => {
        const whole = layOut(clampProtocol([hold('h', 3), step('s', 10, 5)])).sweep(0);
        const cut = [hold('h', 3), step('s', us / 1000, 5), step('t', (10_000 - us) / 1000, 5)];
        expect(layOut(clampProtocol(cut)).sweep(0).lanes[0]!.command).toEqual(whole.lanes[0]!.command);
      }),
      { seed: 20240602 },
    );
  });
});
