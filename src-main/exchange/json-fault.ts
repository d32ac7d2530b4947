// Where a text stops being JSON. JSON.parse says so for some faults only, and differently from version to version.

export interface JsonFault {
  readonly line: number;
  readonly column: number;
  /** What stands there, in a few characters. */
  readonly found: string;
  readonly expected: string;
}

class Stop extends Error {
  readonly offset: number;
  readonly expected: string;
  constructor(offset: number, expected: string) {
    super(expected);
    this.offset = offset;
    this.expected = expected;
  }
}

const deepest = 1000;
const word = /(?:true|false|null)/y;
const number = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
// The control characters are what RFC 8259, section 7, forbids inside a string.
// eslint-disable-next-line no-control-regex
const string = /"(?:[^"\\\u0000-\u001f]|\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4}))*"/y;
const space = /[ \t\r\n]*/y;

/**
 * The first place where a text departs from the grammar of JSON, or null where it does not. Lines and columns from 1;
 * nesting beyond 1000 counts as a fault.
 * @source RFC 8259 (2017), sections 2 to 7.
 */
export function jsonFault(text: string): JsonFault | null {
  try {
    const end = skip(text, valueEnd(text, skip(text, 0), 0));
    return end === text.length ? null : describe(text, end, 'the end of the document');
  } catch (stop) {
    if (stop instanceof Stop) return describe(text, stop.offset, stop.expected);
    throw stop;
  }
}

function describe(text: string, offset: number, expected: string): JsonFault {
  const before = text.slice(0, offset).split('\n');
  const found = /^\S{1,12}/u.exec(text.slice(offset))?.[0];
  return {
    line: before.length,
    column: (before.at(-1) ?? '').length + 1,
    found: found ?? (offset >= text.length ? 'the end of the text' : 'white space'),
    expected,
  };
}

/** The offset after a match at `offset`, or -1. */
function after(pattern: RegExp, text: string, offset: number): number {
  pattern.lastIndex = offset;
  return pattern.test(text) ? pattern.lastIndex : -1;
}

function skip(text: string, offset: number): number {
  return after(space, text, offset);
}

function valueEnd(text: string, offset: number, depth: number): number {
  if (depth > deepest) throw new Stop(offset, `at most ${deepest} levels`);
  const first = text[offset];
  if (first === '{') return membersEnd(text, offset, depth, '}');
  if (first === '[') return membersEnd(text, offset, depth, ']');
  if (first === '"') return stringEnd(text, offset);
  const end = Math.max(after(word, text, offset), after(number, text, offset));
  if (end < 0) throw new Stop(offset, 'a value');
  return end;
}

function stringEnd(text: string, offset: number): number {
  const end = after(string, text, offset);
  if (end < 0) throw new Stop(offset, 'a string in double quotes on one line');
  return end;
}

function membersEnd(text: string, start: number, depth: number, close: '}' | ']'): number {
  let offset = skip(text, start + 1);
  if (text[offset] === close) return offset + 1;
  for (;;) {
    if (close === '}') {
      if (text[offset] !== '"') throw new Stop(offset, 'a name in double quotes');
      offset = skip(text, stringEnd(text, offset));
      if (text[offset] !== ':') throw new Stop(offset, '":"');
      offset = skip(text, offset + 1);
    }
    offset = skip(text, valueEnd(text, offset, depth + 1));
    if (text[offset] === close) return offset + 1;
    if (text[offset] !== ',') throw new Stop(offset, `"," or "${close}"`);
    offset = skip(text, offset + 1);
  }
}
