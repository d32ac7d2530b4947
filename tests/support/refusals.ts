import { expect } from 'vitest';
import type { RefusalData } from '../../src-main/contract/refusal.ts';
import { Refusal } from '../../src-main/units/refuse.ts';

/** What `work` refuses; fails the test when it does not refuse. */
export function refusalsOf(work: () => unknown): readonly RefusalData[] {
  try {
    work();
  } catch (error) {
    if (error instanceof Refusal) return error.all;
    throw error;
  }
  return expect.fail('nothing was refused');
}
