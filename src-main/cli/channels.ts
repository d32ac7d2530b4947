// holdfast channels [--json]: the published channels that a cell can name.
import { listedChannels } from '../engine/listed-channels.ts';
import type { ListedChannel } from '../contract/requests.ts';

const usage = 'usage: holdfast channels [--json]';

/**
 * Prints one block per channel: id, what it is, ion, reversal potential, temperature, Q10 of each gate and source; with
 * `--json` one array of objects.
 *
 * @returns the exit code: 0, or 2 for arguments it does not take.
 */
export function channels(args: string[]): number {
  if (args.some((arg) => arg !== '--json')) {
    process.stderr.write(`${usage}\n`);
    return 2;
  }
  // Curves are not printed, so any temperature serves.
  const listed = listedChannels(22);
  const words = args.length > 0 ? `${JSON.stringify(listed.map(withoutCurves))}\n` : inWords(listed);
  process.stdout.write(words);
  return 0;
}

function withoutCurves(channel: ListedChannel): unknown {
  return { ...channel, gates: channel.gates.map(({ name, power, q10 }) => ({ name, power, q10 })) };
}

function inWords(listed: readonly ListedChannel[]): string {
  const widest = Math.max(...listed.map(({ id }) => id.length));
  const rows = listed.flatMap((channel) => {
    const { id, ion, reversal_mV, temperature_C, source, fromMemory } = channel;
    const measured = temperature_C === null ? 'no temperature stated' : `${temperature_C} °C`;
    const facts = [ion.padEnd(4), `E ${reversal_mV} mV`.padEnd(10), measured.padEnd(21), q10Words(channel)].join('  ');
    const memory = fromMemory ? ' (equations from memory)' : '';
    return [`${id.padEnd(widest)}  ${facts}`, `  ${source}${memory}`];
  });
  return [...rows, ''].join('\n');
}

/** One Q10 where all gates share it, else gate by gate. */
function q10Words({ gates }: ListedChannel): string {
  const [first] = gates;
  if (first !== undefined && gates.every(({ q10 }) => q10 === first.q10)) {
    return first.q10 === 1 ? 'not scaled' : `Q10 ${first.q10}`;
  }
  return `Q10 ${gates.map(({ name, q10 }) => `${name} ${q10}`).join(', ')}`;
}
