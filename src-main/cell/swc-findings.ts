// What reading an SWC file turned up: every code with its sentence, its count and its first lines.
import type { SwcFinding } from '../contract/results.ts';

/** Repaired or accepted, and reported. */
export const repairs = {
  W_BOM: 'The file starts with a byte-order mark; it was dropped.',
  W_UTF16: 'The file is UTF-16 text; it was decoded.',
  W_ENCODING: 'The file is not UTF-8; it was read as Latin-1, which can only alter comments.',
  W_LINE_ENDS: 'Lines end in CR LF or CR; they were split there.',
  W_HEADER_ROW: 'Column names stand before the first sample without a #; they were skipped.',
  W_INLINE_COMMENT: 'A comment follows the numbers; it was cut off.',
  W_SEPARATOR: 'Columns are separated by commas or semicolons; they were read as columns.',
  W_EXTRA_COLUMNS: 'There are more than seven columns; the first seven were used.',
  W_FLOAT_ID: 'Ids, types or parents are written with a decimal point; the fraction is zero, so they were accepted.',
  W_ORDER: 'Samples stand before their parents; they were sorted.',
  W_ID_GAPS: "Ids are not exactly 1 to n; they are numbered anew inside, messages keep the file's.",
  W_DUPLICATE_ROW: 'The same sample is written twice; the second was dropped.',
  W_ROOT_CODE: 'The root is not marked by -1; it was taken as a root.',
  W_TREES: 'The file holds several trees; only the main tree is computed.',
  W_REROOT: 'The root is not in the soma; the tree was turned round at the first soma sample.',
  W_SOMA_SPLIT: 'One tree holds several somata; the largest is the soma, the rest became neurite of unknown type.',
  W_SOMA_3POINT: 'The soma is written as three samples; it was read as one sphere of the same area.',
  W_SOMA_CONTOUR: 'The soma is a traced outline; it was replaced by a sphere of its mean radius.',
  W_NO_SOMA: 'There is no soma; the cell is computed as a fragment that starts at its root.',
  W_TYPE_FORK_END: 'Types 5 and 6 mark forks and tips here; those samples took the type of their parent.',
  W_TYPE_OTHER: 'Types other than 1 to 4 remain; give them a region of their own or leave them to one of yours.',
  W_ZERO_LENGTH: 'Samples repeat the place of their parent; no cable was made between the two.',
  W_RADIUS_ZERO: 'A radius is 0; the radius of the neighbouring sample was taken.',
  W_RADIUS_NEGATIVE: 'A radius is negative; the radius of the neighbouring sample was taken.',
  W_RADIUS_CONSTANT: 'All neurite radii are equal: the diameters were probably not measured.',
  W_FLAT: 'All neurite samples lie in one plane: the lengths are projections and too short.',
  W_UNITS: 'The size is unusual for micrometres; nothing was rescaled.',
  W_STEM_POINT: 'A stem has only one sample; it has no cable.',
} as const;
export type RepairCode = keyof typeof repairs;

/** Refused, and what would be right. */
export const refusals = {
  E_EMPTY: 'give a file with at least one sample of seven columns',
  E_BINARY: 'give a text file; a zero byte shows that this is none',
  E_COLUMNS: 'write all seven columns: id, type, x, y, z, radius, parent',
  E_NUMBER: 'write a plain decimal number with a point, without thousands separators or units',
  E_INTEGER: 'write id, type and parent as whole numbers',
  E_ID: 'give the sample an id of 0 or more',
  E_DUPLICATE_ID: 'give each sample an id of its own',
  E_MISSING_PARENT: 'name a parent that is in the file, or -1 for a root',
  E_CYCLE: 'give the sample a parent that does not descend from it',
  E_SOMA_RADIUS: 'give the soma a radius above 0',
  E_RADIUS: 'give the neurites radii above 0, in micrometres',
  E_LIMIT: 'give a file of at most 100 MB and 2 million samples',
} as const;
export type RefusedCode = keyof typeof refusals;

/** Reading stops here. Caught by `readSwc` alone, which knows the text of the line. */
export class SwcFault extends Error {
  override readonly name = 'SwcFault';
  readonly code: RefusedCode;
  /** From 1; 0 when it is the file as a whole. */
  readonly line: number;

  constructor(code: RefusedCode, line: number) {
    super(`${code} in line ${line}`);
    this.code = code;
    this.line = line;
  }
}

const firstLines = 5;

/** Gathers findings while a file is read. */
export class Findings {
  readonly #found = new Map<RepairCode, { words: string; count: number; lines: number[] }>();

  /** Counts one more of `code`; `line` 0 stands for the file as a whole. */
  note(code: RepairCode, line = 0, words: string = repairs[code]): void {
    const found = this.#found.get(code) ?? { words, count: 0, lines: [] };
    found.count += 1;
    if (line > 0 && found.lines.length < firstLines) found.lines.push(line);
    this.#found.set(code, found);
  }

  /** Sorted by code. */
  list(): SwcFinding[] {
    return [...this.#found]
      .map(([code, found]) => ({ code, words: found.words, count: found.count, lines: found.lines }))
      .sort((a, b) => (a.code < b.code ? -1 : 1));
  }
}
