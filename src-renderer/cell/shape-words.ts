// What a cell's shape is, in one sentence. Pure.
import type { CellDocument, Generator } from '../../src-main/contract/documents.ts';
import { given } from '../text/quantity.ts';

export function shapeWords(cell: CellDocument): string {
  if ('compartments' in cell) {
    return `A sketch: ${cell.compartments.length} compartments and ${cell.couplings_nS.length} couplings between them.`;
  }
  const shape = cell.shape;
  if (shape.kind === 'generator') return generatorWords(shape.generator);
  if ('file' in shape) return `Traced, from ${shape.file}.`;
  return shape.fileName === undefined ? 'Traced (SWC).' : `Traced, from ${shape.fileName}.`;
}

function generatorWords(g: Generator): string {
  switch (g.kind) {
    case 'sphere':
      return `Made: a ball of ${given(g.diameter_um, 'µm')}.`;
    case 'ball-and-stick':
      return `Made: a ball of ${given(g.somaDiameter_um, 'µm')} with a stick of ${given(g.stickLength_um, 'µm')}, ${given(g.stickDiameter_um, 'µm')} thick.`;
    case 'tree':
      return `Made: a tree, ${g.cellType}, seed ${g.seed}${g.size === 1 ? '' : `, size ${given(g.size, '')}`}. No such animal or recording exists.`;
    default:
      return g satisfies never;
  }
}
