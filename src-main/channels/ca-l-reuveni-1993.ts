import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * High-threshold L-type calcium conductance, I = g·q²·r·(V − E), E = +120 mV.
 *
 *     α_q = 0.055·(V + 27)/(1 − exp(−(V + 27)/3.8))    β_q = 0.94·exp(−(V + 75)/17)
 *     α_r = 0.000457·exp(−(V + 13)/50)                 β_r = 0.0065/(1 + exp(−(V + 15)/28))
 *
 * V in mV, rates in 1/ms, used at 36 °C as they are, without a Q10.
 *
 * @source Reuveni I, Friedman A, Amitai Y, Gutnick MJ (1993), J Neurosci 13:4609–4621; unscaled at 36 °C in Pospischil M
 *         et al. (2008), Biol Cybern 99:427–441 (from memory; agrees with two transcriptions). Mainen ZF, Sejnowski TJ
 *         (1996), Nature 382:363–366, take the same rates as 23 °C with Q10 2.3 (from memory).
 */
export const caLReuveni1993: StoredChannel = storedChannel({
  name: 'ca-l-reuveni-1993',
  ion: 'Ca',
  title: 'Ca L-type, Reuveni 1993',
  reversal_mV: 120,
  measuredAt_C: 36,
  gates: [
    {
      name: 'q',
      power: 2,
      alpha: { kind: 'linexp', A: 0.055, V0: -27, k: 3.8 },
      beta: { kind: 'exp', A: 0.94, V0: -75, k: -17 },
    },
    {
      name: 'r',
      power: 1,
      alpha: { kind: 'exp', A: 0.000457, V0: -13, k: -50 },
      beta: { kind: 'logistic', A: 0.0065, V0: -15, k: -28 },
    },
  ],
  source:
    'Reuveni I, Friedman A, Amitai Y, Gutnick MJ (1993), J Neurosci 13:4609–4621; as used in Pospischil M et al. (2008), Biol Cybern 99:427–441',
  fromMemory: true,
  note: 'Neocortical pyramidal cells, high threshold. Taken at 36 °C without scaling; other models take the same rates as 23 °C with a Q10 of 2.3. Ohmic with a fixed reversal potential.',
});
