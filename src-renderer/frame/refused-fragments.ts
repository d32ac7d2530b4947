// Which fragment of the plan line a refusal speaks of, by the place it names. Pure.
import type { RefusalData } from '../../src-main/contract/refusal.ts';

const places: readonly (readonly [RegExp, string])[] = [
  [/rig\.pipettes[.[](?:0|A).*access/i, 'access-A'],
  [/rig\.pipettes[.[](?:1|B).*access/i, 'access-B'],
  [/rig\.pipettes[.[](?:0|A).*site|pipette A/i, 'site-A'],
  [/rig\.pipettes[.[](?:1|B).*site|pipette B/i, 'site-B'],
  [/ladders/i, 'sweeps'],
  [/temperature/i, 'temperature'],
  [/question|readings/i, 'reading'],
  [/^(?:plan\.)?cell\b/i, 'cell'],
];

/** Keys of the fragments to mark. A place none of them knows marks nothing; the answer line says it in words. */
export function refusedFragments(refusals: readonly RefusalData[]): ReadonlySet<string> {
  const keys = refusals.map((r) => places.find(([form]) => form.test(r.place))?.[1]);
  return new Set(keys.filter((key) => key !== undefined));
}
