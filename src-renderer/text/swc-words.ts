// The report on an imported tracing in words.
import type { SwcFinding, SwcMeasures, SwcReport } from '../../src-main/contract/results.ts';
import { figure } from './quantity.ts';

export const outcomeWords: Record<SwcReport['outcome'], string> = {
  accept: 'Taken as it is.',
  report: 'Taken; what was found in it stands below.',
  refuse: 'Not taken: the file cannot be read as one cell.',
};

const somaWords: Record<SwcMeasures['soma'], string> = {
  single: 'one point',
  three_point: 'three points',
  contour: 'an outline',
  multi: 'several points',
  none: 'none traced',
  mixed: 'mixed forms',
};

/** Name and value, in the order people ask for them. */
export function measureRows(m: SwcMeasures): readonly (readonly [string, string])[] {
  // A cell's own count of branches has the soma among them: here the same, so that the two can be compared.
  const branches = m.branch_count + (m.soma === 'none' ? 0 : 1);
  return [
    ['samples in the main tree', `${m.main_tree_samples} of ${m.samples}`],
    ['trees in the file', String(m.trees)],
    ['soma', somaWords[m.soma]],
    ['soma area', figure(m.soma_area_um2, 'µm²')],
    ['length of the branches', figure(m.neurite_length_um, 'µm', 4)],
    ['area of the branches', figure(m.neurite_area_um2, 'µm²', 4)],
    ['stems', String(m.stem_count)],
    [m.soma === 'none' ? 'branches' : 'branches, the soma as one', String(branches)],
    ['branch points', String(m.branch_point_count)],
    ['tips', String(m.tip_count)],
  ];
}

/** "lines 12, 14 and 3 more". */
export function lineWords(lines: readonly number[], count: number): string {
  if (lines.length === 0) return '';
  const shown = lines.slice(0, 5).join(', ');
  const more = Math.max(0, count - Math.min(5, lines.length));
  return `${lines.length === 1 && more === 0 ? 'line' : 'lines'} ${shown}${more > 0 ? ` and ${more} more` : ''}`;
}

/**
 * What lies between the soma's surface and the first samples of its stems, where it is much: then the soma was traced too
 * small, or in another place. Null where the stems begin at it.
 *
 * Gap: the way from the soma's centre to every stem's first sample, less the radius of the sphere of the soma's area. Said
 * from two radii on (design choice): outlines and fine stems leave less.
 */
export function somaGap(m: SwcMeasures): SwcFinding | null {
  if (m.soma === 'none' || m.soma === 'mixed' || m.stem_count === 0) return null;
  const radius = Math.sqrt(m.soma_area_um2 / (4 * Math.PI));
  const gap = m.soma_link_length_um - m.stem_count * radius;
  if (!(gap > 2 * radius)) return null;
  const stems = m.stem_count === 1 ? 'Its one stem begins' : `Its ${m.stem_count} stems begin`;
  const each = m.stem_count === 1 ? '' : ' in all';
  const words = `${stems} ${figure(gap, 'µm')} outside the soma’s surface${each} (radius ${figure(radius, 'µm')}): look whether the soma is traced whole and in its place. The length below leaves this stretch out.`;
  return { code: 'soma-gap', words, count: m.stem_count, lines: [] };
}

/** As much of a refused line as can be read at a glance. */
const mostQuoted = 80;

/** The report with what only the file itself can tell: the text of the refused line, and the gap at the soma. */
export function fullReport(report: SwcReport, bytes: Uint8Array): SwcReport {
  if (report.outcome === 'refuse') {
    const findings = report.findings.map((f) => {
      const text = f.lines[0] === undefined ? '' : lineText(bytes, f.lines[0]);
      return text === '' ? f : { ...f, words: `${f.words} It reads “${text}”.` };
    });
    return { ...report, findings };
  }
  const gap = report.measures === undefined ? null : somaGap(report.measures);
  if (gap === null) return report;
  return { ...report, outcome: 'report', findings: [...report.findings, gap] };
}

/** One line of a text file, from 1; lines end by CR, LF or both. Cut where it is long. */
export function lineText(bytes: Uint8Array, line: number): string {
  let start = 0;
  let at = 1;
  for (let i = 0; i < bytes.length && at < line; i++) {
    const isEnd = bytes[i] === 10 || (bytes[i] === 13 && bytes[i + 1] !== 10);
    if (!isEnd) continue;
    at++;
    start = i + 1;
  }
  if (at < line) return '';
  // Four bytes at most make one sign.
  const piece = bytes.subarray(start, start + 4 * mostQuoted);
  const end = piece.findIndex((byte) => byte === 10 || byte === 13);
  const text = new TextDecoder().decode(end < 0 ? piece : piece.subarray(0, end)).trim();
  return text.length > mostQuoted ? `${text.slice(0, mostQuoted)}…` : text;
}
