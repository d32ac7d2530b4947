import type { Block, BlockKind } from '../../src-main/contract/documents.ts';
import { given, givenNumber } from '../text/quantity.ts';

export const blockKinds: readonly BlockKind[] = ['hold', 'step', 'ramp', 'pulse train'];

/** The kind with its article: "a step". */
export function aBlock(kind: BlockKind): string {
  return `a ${kind}`;
}

/** A new block of a kind: the trade's usual size, at the level it is given. */
export function newBlock(kind: BlockKind, id: string, level: number, holding: number): Block {
  switch (kind) {
    case 'hold':
      return { kind, id, duration_ms: 10 };
    case 'step':
      return { kind, id, duration_ms: 20, level };
    case 'ramp':
      return { kind, id, duration_ms: 50, from: holding, to: level };
    case 'pulse train':
      return { kind, id, duration_ms: 100, level, base: holding, width_ms: 2, rate_Hz: 50, count: 5 };
    default:
      return kind satisfies never;
  }
}

/** What stands in the block's box, from short to shortest; the first that fits is shown. */
export function blockLabels(block: Block, unit: 'mV' | 'pA', rungs: number | null): string[] {
  if (rungs !== null) return [`${block.kind}, ladder of ${rungs}`, `ladder of ${rungs}`, 'ladder'];
  switch (block.kind) {
    case 'hold':
      return ['hold'];
    case 'step':
      return [`step ${given(block.level, unit)}`, 'step'];
    case 'ramp':
      return [`ramp ${givenNumber(block.from)} to ${given(block.to, unit)}`, 'ramp'];
    case 'pulse train':
      return [`${block.count} pulses, ${given(block.rate_Hz, 'Hz')}`, `${block.count} pulses`, 'train'];
    default:
      return block satisfies never;
  }
}
