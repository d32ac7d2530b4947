// The channels that can be added to a region, by what carries their current. Pure.
import type { ChannelDocument } from '../../src-main/contract/documents.ts';
import type { ListedChannel } from '../../src-main/contract/requests.ts';

export interface ChannelEntry {
  readonly id: string;
  readonly title: string;
  /** The region has it already. */
  readonly isThere: boolean;
}
export interface ChannelGroup {
  readonly words: string;
  readonly entries: readonly ChannelEntry[];
}

const ions = [
  { ion: 'Na', words: 'Sodium' },
  { ion: 'K', words: 'Potassium' },
  { ion: 'Ca', words: 'Calcium' },
  { ion: 'Na/K', words: 'Sodium and potassium (h)' },
];

/**
 * The cell's own channels first, then the published ones; groups without an entry left out. An own channel hides the
 * published one of the same name, as it does when the cell is computed.
 */
export function channelGroups(
  listed: readonly ListedChannel[],
  own: readonly ChannelDocument[],
  present: readonly string[],
): ChannelGroup[] {
  const entry = (id: string, title: string): ChannelEntry => ({ id, title, isThere: present.includes(id) });
  const free = listed.filter(({ id }) => own.every(({ name }) => name !== id));
  return [
    { words: 'The cell’s own', entries: own.map(({ name }) => entry(name, name)) },
    ...ions.map(({ ion, words }) => ({
      words,
      entries: free.filter((channel) => channel.ion === ion).map(({ id, title }) => entry(id, title)),
    })),
  ].filter(({ entries }) => entries.length > 0);
}
