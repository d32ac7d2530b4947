import type { PlanDocument } from '../contract/documents.ts';
import { windowFaults } from '../protocol/check-windows.ts';
import type { Faults } from '../protocol/faults.ts';
import { mostNumbersInAll } from '../protocol/sampling.ts';

/**
 * What is wrong between the parts of a plan: names that point across documents, more traces than can be kept. The
 * protocol itself is sound.
 *
 * @param samplesInAll of all sweeps, in one trace each.
 */
export function planFaults(plan: PlanDocument, samplesInAll: number, faults: Faults): void {
  if (plan.question && !plan.protocol.readings.some(({ id }) => id === plan.question?.reading)) {
    const known = plan.protocol.readings.map(({ id }) => id).join(', ') || 'none yet';
    faults.add('name-unknown', {
      thing: 'reading asked for',
      place: 'plan.question.reading',
      value: plan.question.reading,
      remedy: `name a reading of the protocol: ${known}`,
    });
  }
  const { clampWindow } = plan;
  if (clampWindow) windowFaults(plan.protocol, [{ window: clampWindow, place: 'plan.clampWindow' }], faults);
  sizeFaults(plan, samplesInAll, faults);
  plan.probes.forEach((probe, p) => {
    const letters: readonly string[] = plan.rig.pipettes.map(({ letter }) => letter);
    const first = plan.probes.findIndex(({ name }) => name === probe.name);
    if (first === p && !letters.includes(probe.name)) return;
    const remedy = "give each probe a name that is not another probe's or a pipette's letter";
    faults.add('name-twice', { thing: 'probe', place: `plan.probes[${p}].name`, value: probe.name, remedy });
  });
}

/** A pipette has three traces: recording, command and membrane; a probe has one. */
function sizeFaults({ rig, probes }: PlanDocument, samplesInAll: number, faults: Faults): void {
  const traces = 3 * rig.pipettes.length + probes.length;
  if (traces * samplesInAll <= mostNumbersInAll) return;
  faults.add('too-large', {
    thing: 'plan',
    place: 'plan',
    value: `${samplesInAll} samples in all sweeps, in ${traces} traces: more than ${mostNumbersInAll} numbers`,
    remedy: 'sample more coarsely, take fewer sweeps or fewer probes',
  });
}
