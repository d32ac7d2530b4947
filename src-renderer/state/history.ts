// Undo: a list of immutable values and an index. Pure, so that it can be tested without a window.

export interface Change<T> {
  readonly value: T;
  /** What led from the value before to this one: "access resistance 12 → 15 MΩ". Empty for the first. */
  readonly words: string;
  /** Changes of one gesture (a drag, repeated arrow steps) share a key and are undone as one. */
  readonly gesture: string | null;
}

export interface History<T> {
  readonly changes: readonly [Change<T>, ...Change<T>[]];
  /** The value in force is changes[index]. */
  readonly index: number;
}

/** Enough for an afternoon; older steps are dropped so that large cells do not fill the memory. */
const deepest = 200;

/** A history that has only its starting point. */
export function begin<T>(value: T): History<T> {
  return { changes: [{ value, words: '', gesture: null }], index: 0 };
}

/** The value in force. */
export function present<T>(history: History<T>): T {
  return at(history, history.index).value;
}

/**
 * The history with one more value; what was undone before is dropped. An unchanged value adds nothing. Within one
 * gesture the newest value replaces the last, so that one undo goes back to where the gesture began.
 */
export function record<T>(
  history: History<T>,
  value: T,
  words: string | ((before: T, after: T) => string),
  gesture: string | null = null,
): History<T> {
  if (value === present(history)) return history;
  const top = at(history, history.index);
  const joins = gesture !== null && history.index > 0 && top.gesture === gesture;
  const kept = history.changes.slice(0, joins ? history.index : history.index + 1);
  const before = kept.at(-1) ?? history.changes[0];
  // A gesture that came back to where it began (Escape) leaves no step, and the very value from before.
  if (joins && JSON.stringify(value) === JSON.stringify(before.value)) {
    const [start, ...others] = kept;
    return start === undefined ? begin(value) : { changes: [start, ...others], index: others.length };
  }
  const change = { value, words: typeof words === 'string' ? words : words(before.value, value), gesture };
  const [first, ...rest] = [...kept, change].slice(-deepest);
  return first === undefined ? begin(value) : { changes: [first, ...rest], index: rest.length };
}

/** The value a gesture set out from: the one before its step, or the one in force where it has made none yet. */
export function gestureStart<T>(history: History<T>, gesture: string): T {
  const joins = history.index > 0 && at(history, history.index).gesture === gesture;
  return at(history, joins ? history.index - 1 : history.index).value;
}

/** Ends a gesture: the next change with the same key is a step of its own. */
export function settle<T>(history: History<T>): History<T> {
  const top = at(history, history.index);
  if (top.gesture === null) return history;
  const [first, ...rest] = history.changes.map((c, i) => (i === history.index ? { ...c, gesture: null } : c));
  return first === undefined ? history : { changes: [first, ...rest], index: history.index };
}

/** One step back; at the beginning, the history itself. */
export function undone<T>(history: History<T>): History<T> {
  return history.index === 0 ? history : { ...settle(history), index: history.index - 1 };
}

/** One step forward again; at the end, the history itself. */
export function redone<T>(history: History<T>): History<T> {
  return history.index === history.changes.length - 1 ? history : { ...history, index: history.index + 1 };
}

/** What undo would take back; null at the beginning. */
export function undoWords<T>(history: History<T>): string | null {
  return history.index === 0 ? null : at(history, history.index).words;
}

/** What redo would bring back; null at the end. */
export function redoWords<T>(history: History<T>): string | null {
  return history.changes[history.index + 1]?.words ?? null;
}

function at<T>(history: History<T>, index: number): Change<T> {
  return history.changes[index] ?? history.changes[0];
}
