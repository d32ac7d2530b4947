// True of every stored channel: usable wherever a rehearsal may take it, and told apart.
import { describe, expect, it } from 'vitest';
import { readdirSync, readFileSync } from 'node:fs';
import { isInstant } from '../../src-main/channels/kinetics.ts';
import { storedChannels } from '../../src-main/channels/library.ts';
import { operatingPoint } from '../../src-main/solver/operating-point.ts';
import { runSweep } from '../../src-main/solver/sweep.ts';
import { finished, largestDifference, pipette, smallGrid, steps, sweepOf } from '../support/small-grids.ts';

const channels = [...storedChannels.values()];
const published = readdirSync('tests/published').map((file) => readFileSync(`tests/published/${file}`, 'utf8'));

describe.each(channels)('$name', (channel) => {
  it('has gates within 0 and 1 and finite time constants from −150 to 100 mV', () => {
    for (const gate of channel.gates) {
      for (let V = -150; V <= 100; V += 0.25) {
        const [inf, tau] = [gate.inf(V), gate.tau(V)];
        expect(inf, `${gate.name} at ${V} mV`).toBeGreaterThanOrEqual(0);
        // The slack a user's own gates have, too: the A-type fit of Connor and Stevens passes 1 by 1.4 %.
        expect(inf, `${gate.name} at ${V} mV`).toBeLessThanOrEqual(
          channel.name === 'k-a-connor-stevens-1971' ? 1.05 : 1,
        );
        expect(Number.isFinite(tau), `τ of ${gate.name} at ${V} mV`).toBe(true);
        if (isInstant(gate)) expect(tau).toBe(0);
        else expect(tau, `τ of ${gate.name} at ${V} mV`).toBeGreaterThan(0);
      }
    }
  });

  it('goes through a clamp of 10 MΩ from rest at −80 mV to −120, −20 and 60 mV, and halved steps tell no other story', () => {
    const { name, reversal } = channel;
    const compartment = { parent: -1, area_um2: 1000, channels: { leak: 0.1, [name]: 5 } };
    const grid = smallGrid([compartment], { leak: -80, [name]: reversal });
    const command = steps('mV', 80, [
      [0, -80],
      [10, -120],
      [30, -20],
      [60, 60],
    ]);
    const held = pipette('voltage clamp', command, { access: 10e6 });
    const model = { grid, kinetics: storedChannels, temperature: 30 };
    const rest = operatingPoint({ ...model, pipettes: [{ ...held, holding: -0.08 }] });
    const current = (step: number): Float64Array =>
      finished(
        runSweep(sweepOf({ ...model, start: rest.state, duration: 0.08, pipettes: [held], sampling: 100e-6, step })),
      ).current[0]!;
    const [coarse, fine] = [current(25e-6), current(12.5e-6)];
    const largest = fine.reduce((most, I) => Math.max(most, Math.abs(I)), 0);
    // Measured, while the patch charges within 0.3 ms of a jump: 0.2 % of the largest current, of which 0.13 % is
    // charging alone; up to 0.9 % with a gate that follows at once. Both fall with the square of the step.
    expect(largestDifference(coarse, fine) / largest).toBeLessThan(channel.gates.some(isInstant) ? 0.01 : 0.0025);
  });

  it('scales nothing without a temperature to scale from', () => {
    if (channel.measuredAt === null) for (const gate of channel.gates) expect(gate.q10).toBe(1);
    else for (const gate of channel.gates) expect(gate.q10Reference).toBe(channel.measuredAt);
  });

  it('says what it is and where it is from, and is checked against its paper', () => {
    expect(channel.name).toMatch(/^(?:na|k|ca|h)-(?:[a-z0-9]+-)*[a-z]+-\d{4}$/);
    // The year of the id stands in the title and in the source.
    const year = channel.name.slice(-4);
    expect(channel.title.endsWith(year)).toBe(true);
    expect(channel.source).toContain(`(${year})`);
    expect(channel.note).not.toBe('');
    expect(published.some((text) => text.includes(`channels/${channel.name}.ts`))).toBe(true);
  });
});

describe('the library', () => {
  it('has every channel once, by id and by title', () => {
    expect(new Set(channels.map(({ name }) => name)).size).toBe(channels.length);
    expect(new Set(channels.map(({ title }) => title)).size).toBe(channels.length);
    expect(readdirSync('src-main/channels').filter((file) => /-\d{4}\.ts$/.test(file))).toHaveLength(channels.length);
  });

  it('has reversal potentials of its ions: Na 40 to 60 mV, K −100 to −70, Ca above 100, Na/K between', () => {
    const within = { Na: [40, 60], K: [-100, -70], Ca: [100, 150], 'Na/K': [-50, -20] } as const;
    for (const { ion, reversal } of channels) {
      expect(reversal).toBeGreaterThanOrEqual(within[ion][0]);
      expect(reversal).toBeLessThanOrEqual(within[ion][1]);
    }
  });
});
