// Conversions between the trade units of documents and the SI units inside. The only place where powers of ten stand.

export type Volt = number;
export type Ampere = number;
export type Siemens = number;
export type Farad = number;
export type Ohm = number;
export type Metre = number;
export type SquareMetre = number;
export type Second = number;
export type Hertz = number;

/** SI value of one trade unit: `fromTrade.mV` = 1e-3 V. Dividing instead of multiplying keeps decimal inputs exact. */
const perSi = {
  mV: 1e3,
  pA: 1e12,
  nA: 1e9,
  nS: 1e9,
  pF: 1e12,
  ms: 1e3,
  us: 1e6,
  um: 1e6,
  um2: 1e12,
  fC: 1e15,
} as const;
/** Trade units larger than their SI unit. */
const inSi = {
  MOhm: 1e6,
  kOhm: 1e3,
  /** 1 µF/cm² = 0.01 F/m². */
  uF_cm2: 1e-2,
  /** 1 mS/cm² = 10 S/m². */
  mS_cm2: 10,
  /** 1 Ω·cm = 0.01 Ω·m. */
  Ohm_cm: 1e-2,
} as const;

export type TradeUnit = keyof typeof perSi | keyof typeof inSi;

/** A value in a trade unit, in SI. `toSi(-70, 'mV')` is −0.07 V. Exact to one rounding. */
export function toSi(value: number, unit: TradeUnit): number {
  return unit in perSi ? value / perSi[unit as keyof typeof perSi] : value * inSi[unit as keyof typeof inSi];
}

/** A value in SI, in a trade unit. `fromSi(-0.07, 'mV')` is −70. Exact to one rounding. */
export function fromSi(value: number, unit: TradeUnit): number {
  return unit in perSi ? value * perSi[unit as keyof typeof perSi] : value / inSi[unit as keyof typeof inSi];
}
