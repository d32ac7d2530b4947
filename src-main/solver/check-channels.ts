import type { CellDocument } from '../contract/documents.ts';
import { kineticsOf } from '../channels/own.ts';
import type { Gate } from '../channels/kinetics.ts';
import type { Faults } from '../protocol/faults.ts';

/** Voltages at which a user's own gates are tried, mV: beyond what any clamp commands, 1 mV apart. */
const lowest_mV = -150;
const highest_mV = 100;
/** A fit to measured points may pass 1 by this much; a slip in a formula passes it by far. */
const highest_inf = 1.05;

/** A cell's own gates must be usable at every voltage a rehearsal may reach. Names the first voltage that fails. */
export function ownChannelFaults(cell: CellDocument, faults: Faults): void {
  cell.channels.forEach((channel, c) => {
    const place = `cell.channels[${c}]`;
    if (cell.channels.findIndex(({ name }) => name === channel.name) !== c) {
      const remedy = 'give each channel its own name';
      faults.add('name-twice', { thing: 'channel', place: `${place}.name`, value: channel.name, remedy });
    }
    kineticsOf(channel).gates.forEach((gate, g) => {
      const fault = firstFault(gate);
      if (fault === undefined) return;
      faults.add('quantity-out-of-range', { thing: `gate ${gate.name}`, place: `${place}.gates[${g}]`, ...fault });
    });
  });
}

function firstFault(gate: Gate): { value: string; remedy: string } | undefined {
  for (let V = lowest_mV; V <= highest_mV; V += 1) {
    const inf = gate.inf(V);
    const tau = gate.tau(V);
    // Published fits pass 1 at the far end (the A-type gate of Connor and Stevens, 1.0007 at 41 mV), and rounding may
    // leave a steady state a hair below 0.
    if (!(inf >= -1e-9 && inf <= highest_inf)) {
      return { value: `steady state ${inf} at ${V} mV`, remedy: 'change the rates so that it stays within 0 and 1' };
    }
    if (!(tau > 0 && Number.isFinite(tau))) {
      const remedy = 'change the rates so that it stays finite and above 0';
      return { value: `time constant ${tau} ms at ${V} mV`, remedy };
    }
  }
  return undefined;
}

/** Every channel a make-up or a sketched compartment names must be the cell's own or a stored one. */
export function channelNameFaults(cell: CellDocument, stored: Iterable<string>, faults: Faults): void {
  const known = new Set([...cell.channels.map(({ name }) => name), ...stored]);
  const remedy = `name one of the cell's own channels or a stored one: ${[...known].join(', ')}`;
  const check = (name: string, place: string): void => {
    if (!known.has(name)) faults.add('name-unknown', { thing: 'channel', place, value: name, remedy });
  };
  if ('makeUp' in cell) {
    cell.makeUp.forEach((makeUp, m) => {
      makeUp.channels.forEach(({ channel }, c) => check(channel, `cell.makeUp[${m}].channels[${c}].channel`));
    });
  } else {
    cell.compartments.forEach((compartment, k) => {
      for (const name of Object.keys(compartment.channels)) check(name, `cell.compartments[${k}].channels.${name}`);
    });
  }
}
