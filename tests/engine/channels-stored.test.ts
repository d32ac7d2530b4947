// The question 'channels stored': the published channels and their curves.
import { describe, expect, it } from 'vitest';
import { storedChannels } from '../../src-main/channels/library.ts';
import type { ListedChannel } from '../../src-main/contract/requests.ts';
import { createEngine } from '../../src-main/engine/engine.ts';

async function listed(temperature_C: number): Promise<readonly ListedChannel[]> {
  const engine = createEngine({ workers: 1, log: () => undefined });
  try {
    const answer = await engine.ask('channels stored', { temperature_C });
    if (!answer.ok) throw new Error(JSON.stringify(answer));
    return answer.value;
  } finally {
    await engine.close();
  }
}

describe('channels stored', () => {
  it('gives every stored channel with what a reader must know before using it', async () => {
    const found = await listed(22);
    expect(found.map(({ id }) => id)).toEqual([...storedChannels.keys()]);
    const [first] = found;
    expect(first).toMatchObject({ title: 'Na, Hodgkin & Huxley 1952', ion: 'Na', reversal_mV: 50, temperature_C: 6.3 });
    expect(found.find(({ id }) => id === 'na-wang-buzsaki-1996')).toMatchObject({
      temperature_C: null,
      fromMemory: true,
    });
  });

  it('gives curves from −120 to 80 mV in typed arrays, one value per voltage', async () => {
    for (const { gates } of await listed(22)) {
      for (const { voltages_mV, inf, tau_ms } of gates) {
        expect([voltages_mV[0], voltages_mV.at(-1), voltages_mV.length]).toEqual([-120, 80, 201]);
        expect(inf).toBeInstanceOf(Float64Array);
        expect([inf.length, tau_ms.length]).toEqual([201, 201]);
      }
    }
  });

  it('gives time constants at the temperature asked for: 3 times faster 10 °C above the squid, steady states the same', async () => {
    const at = async (T: number) => (await listed(T)).find(({ id }) => id === 'na-hodgkin-huxley-1952')!.gates[1]!;
    const [cold, warm] = [await at(6.3), await at(16.3)];
    // −65 mV is the 56th voltage: h∞ 0.596121, τ_h 8.51601 ms at 6.3 °C (computed from the printed rates).
    expect(cold.inf[55]).toBeCloseTo(0.596121, 6);
    expect(cold.tau_ms[55]).toBeCloseTo(8.51601, 5);
    expect(cold.tau_ms[55]! / warm.tau_ms[55]!).toBeCloseTo(3, 12);
    expect(warm.inf).toEqual(cold.inf);
  });

  it('leaves channels without a temperature as they are, and gates that follow at once at 0', async () => {
    const at = async (T: number) => (await listed(T)).find(({ id }) => id === 'na-golomb-2007')!.gates;
    const [cold, warm] = [await at(10), await at(37)];
    expect(warm).toEqual(cold);
    expect(cold[0]!.tau_ms.every((tau) => tau === 0)).toBe(true);
  });

  it('refuses a temperature beyond those of cells', async () => {
    const engine = createEngine({ workers: 1, log: () => undefined });
    const answer = await engine.ask('channels stored', { temperature_C: 60 });
    await engine.close();
    expect(answer).toMatchObject({ ok: false, refusals: [{ code: 'request-malformed' }] });
  });
});
