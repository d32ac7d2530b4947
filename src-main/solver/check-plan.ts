import type { PlanDocument } from '../contract/documents.ts';
import { windowFaults } from '../protocol/check-windows.ts';
import type { Faults } from '../protocol/faults.ts';

/** What is wrong between the parts of a plan: names that point across documents. The protocol itself is sound. */
export function planFaults(plan: PlanDocument, faults: Faults): void {
  if (plan.question && !plan.protocol.readings.some(({ id }) => id === plan.question?.reading)) {
    const known = plan.protocol.readings.map(({ id }) => id).join(', ') || 'none yet';
    faults.add('name-unknown', {
      thing: 'reading asked for',
      place: 'plan.question.reading',
      value: plan.question.reading,
      remedy: `name a reading of the protocol: ${known}`,
    });
  }
  if (plan.clampWindow) windowFaults(plan.protocol, plan.clampWindow, 'plan.clampWindow', faults);
  plan.probes.forEach((probe, p) => {
    const letters: readonly string[] = plan.rig.pipettes.map(({ letter }) => letter);
    const first = plan.probes.findIndex(({ name }) => name === probe.name);
    if (first === p && !letters.includes(probe.name)) return;
    const remedy = "give each probe a name that is not another probe's or a pipette's letter";
    faults.add('name-twice', { thing: 'probe', place: `plan.probes[${p}].name`, value: probe.name, remedy });
  });
}
