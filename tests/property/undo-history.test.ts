// Undo: whatever was done, going back and forward again leads to the same place.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  begin,
  gestureStart,
  present,
  record,
  redone,
  redoWords,
  settle,
  undone,
  undoWords,
  type History,
} from '../../src-renderer/state/history.ts';

const steps = fc.array(fc.record({ value: fc.integer(), gesture: fc.constantFrom(null, null, 'drag A', 'field x') }), {
  maxLength: 60,
});
const played = (list: readonly { value: number; gesture: string | null }[]): History<number> =>
  list.reduce((h, s, i) => record(h, s.value, `step ${i}`, s.gesture), begin(-1));

describe('undo and redo', () => {
  it('undoing everything leads to the beginning, redoing everything back to the end', () => {
    fc.assert(
      fc.property(steps, (list) => {
        const end = played(list);
        let h = end;
        while (undoWords(h) !== null) h = undone(h);
        expect(present(h)).toBe(-1);
        while (redoWords(h) !== null) h = redone(h);
        expect(present(h)).toBe(present(end));
      }),
    );
  });

  it('a change after undo drops what was undone', () => {
    const h = record(undone(record(record(begin('a'), 'b', 'b'), 'c', 'c')), 'd', 'd');
    expect([present(h), redoWords(h), present(undone(h))]).toEqual(['d', null, 'b']);
  });

  it('a gesture is one step, and its words compare its two ends', () => {
    const words = (before: number, after: number): string => `access ${before} → ${after} MΩ`;
    const h = [13, 14, 15].reduce((now, v) => record(now, v, words, 'drag'), begin(12));
    expect(undoWords(h)).toBe('access 12 → 15 MΩ');
    expect(present(undone(h))).toBe(12);
  });

  it('a gesture knows where it set out from, however far it has gone, and only while it lasts', () => {
    const h = [13, 14].reduce((now, v) => record(now, v, 'x', 'drag'), begin(12));
    expect(gestureStart(h, 'drag')).toBe(12);
    expect(gestureStart(h, 'another')).toBe(14);
    expect(gestureStart(settle(h), 'drag')).toBe(14);
    expect(gestureStart(begin(12), 'drag')).toBe(12);
  });

  it('a gesture that comes back to where it began is no step, and the value is the very same', () => {
    const first = { access: 5 };
    const h = [{ access: 1 }, { access: 12 }, { access: 5 }].reduce(
      (now, v) => record(now, v, 'x', 'field'),
      begin(first),
    );
    expect(undoWords(h)).toBeNull();
    expect(present(h)).toBe(first);
  });

  it('two gestures of one name are two steps once the first has ended', () => {
    const h = record(settle(record(begin(1), 2, 'a', 'drag')), 3, 'b', 'drag');
    expect(present(undone(h))).toBe(2);
  });

  it('a change that changes nothing is no step', () => {
    const h = begin(1);
    expect(record(h, 1, 'nothing')).toBe(h);
  });

  it('forgets the oldest steps before it fills the memory, and still goes back 100', () => {
    const h = Array.from({ length: 1000 }, (_, i) => i).reduce((now, v) => record(now, v, 'x'), begin(-1));
    expect(h.changes.length).toBeLessThanOrEqual(200);
    let back = h;
    for (let i = 0; i < 100; i++) back = undone(back);
    expect(present(back)).toBe(899);
  });
});
