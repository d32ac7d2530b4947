import { listedChannels } from '../listed-channels.ts';
import type { Handlers } from '../handlers.ts';

export const channelHandlers = {
  'channels stored': ({ temperature_C }) => listedChannels(temperature_C),
} satisfies Partial<Handlers>;
