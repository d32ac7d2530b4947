import type { RefusalData } from '../contract/refusal.ts';
import { Refusal } from '../units/refuse.ts';

/** @throws Refusal with all faults, when there are any. */
export function refuseFaults(faults: readonly RefusalData[]): void {
  const [first, ...rest] = faults;
  if (first !== undefined) throw new Refusal([first, ...rest]);
}
