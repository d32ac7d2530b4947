// The published channels, as the engine lists them. Asked for at the start for their titles, again where curves are shown.
import type { ListedChannel } from '../../src-main/contract/requests.ts';
import { askOrSay } from './ask.ts';

class ChannelLibraryState {
  /** Empty until the first answer. */
  listed = $state.raw<readonly ListedChannel[]>([]);
  /** °C at which the time constants hold. */
  temperature = $state<number | null>(null);
  #wanted: number | null = null;

  readonly #byId = $derived(new Map(this.listed.map((channel) => [channel.id, channel])));

  /** Has the time constants at this temperature; asks only where it is another. */
  async load(temperature_C: number): Promise<void> {
    if (this.#wanted === temperature_C) return;
    this.#wanted = temperature_C;
    const listed = await askOrSay('channels stored', { temperature_C });
    if (this.#wanted !== temperature_C) return;
    if (listed === null) this.#wanted = this.temperature;
    else {
      this.listed = listed;
      this.temperature = temperature_C;
    }
  }

  /** A stored channel's title; any other name as it is. */
  words(channel: string): string {
    return this.#byId.get(channel)?.title ?? channel;
  }
}

export const channelLibrary = new ChannelLibraryState();
