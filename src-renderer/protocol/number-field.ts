import type { Block } from '../../src-main/contract/documents.ts';
import { numberUnit, type LadderNumber } from './ladder-rungs.ts';

/** How a block's number is typed: its unit, one arrow step, its least. */
export interface NumberRules {
  readonly unit: string;
  readonly step: number;
  readonly least: number;
  readonly isWhole: boolean;
}

/** The smallest duration is one sampling interval, in ms. */
export function numberRules(number: LadderNumber, laneUnit: 'mV' | 'pA', sampling_us: number): NumberRules {
  const unit = numberUnit(number, laneUnit);
  const interval = Number((sampling_us / 1000).toPrecision(12));
  switch (number) {
    case 'duration_ms':
      return { unit, step: 1, least: interval, isWhole: false };
    case 'width_ms':
      return { unit, step: 0.5, least: interval, isWhole: false };
    case 'rate_Hz':
      return { unit, step: 5, least: 0.001, isWhole: false };
    case 'count':
      return { unit, step: 1, least: 1, isWhole: true };
    case 'level':
    case 'base':
    case 'from':
    case 'to':
      return { unit, step: laneUnit === 'mV' ? 5 : 10, least: -Infinity, isWhole: false };
    default:
      return number satisfies never;
  }
}

/** The number as the block has it; NaN when this kind of block has none. */
export function numberOf(block: Block, number: LadderNumber): number {
  const value = (block as unknown as Record<string, unknown>)[number];
  return typeof value === 'number' ? value : NaN;
}
