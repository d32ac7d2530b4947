import type { ProtocolDocument, Window } from '../contract/documents.ts';
import type { Faults } from './faults.ts';
import { longestLane, rungBlocks } from './lane.ts';
import { rungsOf } from './ladder.ts';
import { msOf } from './ticks.ts';
import { windowTicks, type BlocksByLane } from './window.ts';

/** A window with its JSON path. */
export interface PlacedWindow {
  readonly window: Window;
  readonly place: string;
}

/**
 * Windows that hang on nothing, run backwards or leave the sweep; each fault once, at its first sweep.
 * Without `lengths` only the names are looked at: for protocols whose blocks are themselves at fault.
 */
export function windowFaults(
  protocol: ProtocolDocument,
  windows: readonly PlacedWindow[],
  faults: Faults,
  lengths = true,
): void {
  let sound = windows.filter(({ window, place }) => windowNames(protocol, window, place, faults));
  if (!lengths) return;
  for (let rung = 0; rung < rungsOf(protocol) && sound.length > 0; rung += 1) {
    const lanes = rungBlocks(protocol, rung);
    const sweep: BlocksByLane = {
      lanes: protocol.lanes.map((lane, l) => ({ pipette: lane.pipette, blocks: lanes[l] ?? [] })),
    };
    const end = longestLane(lanes);
    sound = sound.filter(({ window, place }) => {
      const at = windowTicks(window, sweep);
      if (at === undefined || (at.from >= 0 && at.from < at.to && at.to <= end)) return true;
      faults.add('window-outside-sweep', {
        thing: at.from < at.to ? 'window' : 'window that does not end after its start',
        place,
        value: `${msOf(at.from)} to ${msOf(at.to)} ms in sweep ${rung + 1}`,
        remedy: `keep it within 0 and ${msOf(end)} ms, its end after its start`,
      });
      return false;
    });
  }
}

function windowNames(protocol: ProtocolDocument, window: Window, place: string, faults: Faults): boolean {
  const lane = protocol.lanes.find((candidate) => candidate.pipette === window.lane);
  if (lane === undefined) {
    const remedy = `name a lane of the protocol: ${protocol.lanes.map(({ pipette }) => pipette).join(', ')}`;
    faults.add('name-unknown', { thing: 'lane of the window', place: `${place}.lane`, value: window.lane, remedy });
    return false;
  }
  let known = true;
  for (const edge of ['from', 'to'] as const) {
    const id = window[edge].block;
    if (lane.blocks.some((block) => block.id === id)) continue;
    known = false;
    const remedy = `name a block of lane ${lane.pipette}: ${lane.blocks.map((block) => block.id).join(', ')}`;
    faults.add('name-unknown', { thing: 'block of the window', place: `${place}.${edge}.block`, value: id, remedy });
  }
  return known;
}
