// Bytes of an SWC file to text, and text to lines.
import { Findings, SwcFault } from './swc-findings.ts';

/** Refused before it is read. Design choice: the largest published reconstructions stay far below. */
export const mostBytes = 100_000_000;

/**
 * The text of an SWC file: UTF-8 with or without mark, UTF-16 with mark, else Latin-1.
 *
 * @throws SwcFault `E_LIMIT` above 100 MB, `E_BINARY` at a zero byte.
 */
export function decodeSwc(bytes: Uint8Array, findings: Findings): string {
  if (bytes.length > mostBytes) throw new SwcFault('E_LIMIT', 0);
  const whole = decoded(bytes, findings);
  // An old end-of-file mark (Ctrl-Z) is no sample.
  const text = whole.endsWith('\u001a') ? whole.slice(0, -1) : whole;
  const zero = text.indexOf('\0');
  if (zero >= 0) throw new SwcFault('E_BINARY', lineAt(text, zero));
  if (text.includes('\r')) findings.note('W_LINE_ENDS');
  return text;
}

/** The text as a document keeps it, decoded as for reading; what is wrong with it shows when it is read. */
export function textOfSwc(bytes: Uint8Array): string {
  return decoded(bytes, new Findings());
}

function decoded(bytes: Uint8Array, findings: Findings): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) {
    findings.note('W_UTF16');
    return new TextDecoder('utf-16le').decode(bytes);
  }
  if (bytes[0] === 0xfe && bytes[1] === 0xff) {
    findings.note('W_UTF16');
    return new TextDecoder('utf-16be').decode(bytes);
  }
  let rest = bytes;
  if (bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) {
    findings.note('W_BOM');
    rest = bytes.subarray(3);
  }
  if (isUtf8(rest)) return new TextDecoder('utf-8', { ignoreBOM: true }).decode(rest);
  findings.note('W_ENCODING');
  return new TextDecoder('latin1').decode(rest);
}

function isUtf8(bytes: Uint8Array): boolean {
  try {
    new TextDecoder('utf-8', { fatal: true }).decode(bytes);
    return true;
  } catch (error) {
    if (error instanceof TypeError) return false;
    throw error;
  }
}

/** The lines of a text, split at CR LF, LF or CR; one at a time, so that a reader may stop early. */
export function* linesOf(text: string): Generator<string> {
  const end = /\r\n|\n|\r/g;
  let from = 0;
  for (let found = end.exec(text); found !== null; found = end.exec(text)) {
    yield text.slice(from, found.index);
    from = end.lastIndex;
  }
  yield text.slice(from);
}

/** The text of one line, from 1; empty for line 0. */
export function lineOf(text: string, line: number): string {
  let number = 0;
  for (const words of linesOf(text)) {
    number += 1;
    if (number === line) return words;
  }
  return '';
}

function lineAt(text: string, index: number): number {
  const before = linesOf(text.slice(0, index));
  let line = 0;
  while (before.next().done !== true) line += 1;
  return line;
}
