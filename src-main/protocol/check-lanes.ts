import type { ProtocolDocument, RigDocument } from '../contract/documents.ts';
import type { Faults } from './faults.ts';

/** Lanes and pipettes must pair off, and a lane's unit must be what its pipette commands. */
export function laneFaults(protocol: ProtocolDocument, rig: RigDocument, faults: Faults): void {
  protocol.lanes.forEach((lane, l) => {
    const pipette = rig.pipettes.find((candidate) => candidate.letter === lane.pipette);
    if (pipette === undefined) {
      faults.add('name-unknown', {
        thing: 'pipette of the lane',
        place: `protocol.lanes[${l}].pipette`,
        value: lane.pipette,
        remedy: `the rig has ${rig.pipettes.map(({ letter }) => letter).join(', ')}: add the pipette or remove the lane`,
      });
      return;
    }
    const unit = pipette.mode === 'voltage clamp' ? 'mV' : 'pA';
    if (lane.unit === unit) return;
    faults.add('unit-unknown', {
      thing: `unit of lane ${lane.pipette}`,
      place: `protocol.lanes[${l}].unit`,
      value: lane.unit,
      remedy: `pipette ${lane.pipette} is in ${pipette.mode}: give ${unit} or change its mode`,
    });
  });
  rig.pipettes.forEach((pipette, p) => {
    if (protocol.lanes.some((lane) => lane.pipette === pipette.letter)) return;
    faults.add('document-field-missing', {
      thing: `lane of pipette ${pipette.letter}`,
      place: 'protocol.lanes',
      value: `none for rig.pipettes[${p}]`,
      remedy: 'give the pipette a lane, one hold block at least, or take it off the rig',
    });
  });
}
