import type { Generator } from '../src-main/contract/documents.ts';

/** What makes each example cell's shape, by file name. */
export const exampleShapes: Readonly<Record<string, Generator>> = {
  'layer-5-like-pyramidal': { kind: 'tree', cellType: 'layer-5-like pyramidal', seed: 5, size: 1 },
  'fast-interneuron': { kind: 'tree', cellType: 'fast interneuron', seed: 2, size: 1 },
  'granule-like-cell': { kind: 'tree', cellType: 'granule-like', seed: 2, size: 1 },
  'round-cell': { kind: 'tree', cellType: 'round', seed: 1, size: 1 },
};
