// The report on an imported tracing in words.
import type { SwcMeasures, SwcReport } from '../../src-main/contract/results.ts';
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
  return [
    ['samples in the main tree', `${m.main_tree_samples} of ${m.samples}`],
    ['trees in the file', String(m.trees)],
    ['soma', somaWords[m.soma]],
    ['soma area', figure(m.soma_area_um2, 'µm²')],
    ['length of the branches', figure(m.neurite_length_um, 'µm', 4)],
    ['area of the branches', figure(m.neurite_area_um2, 'µm²', 4)],
    ['stems', String(m.stem_count)],
    ['branches', String(m.branch_count)],
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
