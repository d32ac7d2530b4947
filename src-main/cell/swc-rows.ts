// Lines of an SWC file to samples, each with the parent's id as written.
import { SwcFault, type Findings } from './swc-findings.ts';
import { linesOf } from './swc-text.ts';

/** Design choice, as the limit of bytes. */
export const mostSamples = 2_000_000;

export interface SwcRow {
  readonly id: string;
  readonly line: number;
  readonly type: number;
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly radius: number;
  /** Canonical; starts with "-" for a root. */
  readonly parentId: string;
}
export interface SwcRows {
  readonly rows: readonly SwcRow[];
  /** Comment lines before the first sample, as written. */
  readonly header: readonly string[];
}

// Tokens are tested before they are converted: Number('') is 0 and Number('0x3C') is 60.
const decimal = /^[+-]?(\d+(\.\d*)?|\.\d+)([eE][+-]?\d+)?$/;
const integer = /^[+-]?\d+$/;
// A byte-order mark inside the text is no blank, as it is for trim() and \s: it would hide where two files were joined.
const blanks = /[^\S\ufeff]+/;
const integerAsDecimal = /^[+-]?\d+\.0*$/;

/**
 * The samples of a file in file order, exact repeats dropped.
 *
 * @throws SwcFault `E_COLUMNS`, `E_NUMBER`, `E_INTEGER`, `E_ID`, `E_DUPLICATE_ID`, `E_LIMIT` with the first bad line,
 *         `E_EMPTY` without any sample.
 */
export function readRows(text: string, findings: Findings, most = mostSamples): SwcRows {
  const rows: SwcRow[] = [];
  const byId = new Map<string, SwcRow>();
  const header: string[] = [];
  let line = 0;
  for (const written of linesOf(text)) {
    line += 1;
    let words = trimmed(written);
    if (words.startsWith('#')) {
      if (rows.length === 0) header.push(written);
      continue;
    }
    if (words === '') continue;
    const comment = words.indexOf('#');
    if (comment >= 0) {
      findings.note('W_INLINE_COMMENT', line);
      words = trimmed(words.slice(0, comment));
    }
    if (rows.length === 0 && /^\p{L}/u.test(words)) {
      findings.note('W_HEADER_ROW', line);
      continue;
    }
    const row = rowOf(columnsOf(words, line, findings), line, findings);
    const before = byId.get(row.id);
    if (before !== undefined) {
      if (!sameSample(before, row)) throw new SwcFault('E_DUPLICATE_ID', line);
      findings.note('W_DUPLICATE_ROW', line);
      continue;
    }
    if (rows.length >= most) throw new SwcFault('E_LIMIT', line);
    byId.set(row.id, row);
    rows.push(row);
  }
  if (rows.length === 0) throw new SwcFault('E_EMPTY', 0);
  return { rows, header };
}

function rowOf(columns: readonly string[], line: number, findings: Findings): SwcRow {
  const [id, type, x, y, z, radius, parent] = columns;
  if (
    id === undefined ||
    type === undefined ||
    x === undefined ||
    y === undefined ||
    z === undefined ||
    radius === undefined ||
    parent === undefined
  )
    throw new SwcFault('E_COLUMNS', line);
  if (columns.length > 7) findings.note('W_EXTRA_COLUMNS', line);
  const row = {
    id: whole(id, line, findings),
    line,
    type: Number(whole(type, line, findings)),
    x: real(x, line),
    y: real(y, line),
    z: real(z, line),
    radius: real(radius, line),
    parentId: whole(parent, line, findings),
  };
  if (row.id.startsWith('-')) throw new SwcFault('E_ID', line);
  return row;
}

function columnsOf(words: string, line: number, findings: Findings): string[] {
  if (words.includes(';')) {
    findings.note('W_SEPARATOR', line);
    return words.split(';').map(trimmed);
  }
  if (!words.includes(',')) return words.split(blanks);
  const parts = words.split(',').map(trimmed);
  if (parts.length > 6 && !parts.some((part) => /\s/.test(part))) {
    findings.note('W_SEPARATOR', line);
    return parts;
  }
  return words.split(blanks);
}

/** Without blanks at both ends. By hand: a regular expression would take forever on a line of a million blanks. */
function trimmed(text: string): string {
  const isBlank = (at: number) => text[at] !== '\ufeff' && text[at]?.trim() === '';
  let from = 0;
  let to = text.length;
  while (isBlank(from)) from += 1;
  while (to > from && isBlank(to - 1)) to -= 1;
  return text.slice(from, to);
}

/** A whole number in canonical form: "+07" and "7.0" are "7", "-0" is "0". */
function whole(token: string, line: number, findings: Findings): string {
  if (!integer.test(token)) {
    if (!integerAsDecimal.test(token)) throw new SwcFault(decimal.test(token) ? 'E_INTEGER' : 'E_NUMBER', line);
    findings.note('W_FLOAT_ID', line);
  }
  const sign = token.startsWith('-') ? '-' : '';
  const digits = token
    .replace(/^[+-]/, '')
    .replace(/\..*$/, '')
    .replace(/^0+(?=\d)/, '');
  return digits === '0' ? '0' : sign + digits;
}

function real(token: string, line: number): number {
  const value = decimal.test(token) ? Number(token) : NaN;
  if (!Number.isFinite(value)) throw new SwcFault('E_NUMBER', line);
  return value;
}

function sameSample(a: SwcRow, b: SwcRow): boolean {
  return (
    a.type === b.type && a.x === b.x && a.y === b.y && a.z === b.z && a.radius === b.radius && a.parentId === b.parentId
  );
}
