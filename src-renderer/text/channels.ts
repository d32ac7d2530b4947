// Channels in words.

/** The stored channels, by id. A cell's own keep the name they were given. */
export const storedChannels: readonly { readonly id: string; readonly words: string }[] = [
  { id: 'na-hodgkin-huxley-1952', words: 'Na, Hodgkin & Huxley 1952' },
  { id: 'k-hodgkin-huxley-1952', words: 'K, Hodgkin & Huxley 1952' },
];

export function channelWords(channel: string): string {
  return storedChannels.find((c) => c.id === channel)?.words ?? channel;
}
