// One cut cone: the piece of cable between two samples.
import type { Metre, Ohm, SquareMetre } from '../units/si.ts';

/**
 * Side of a cut cone, without its end discs: π·(r0 + r1)·√(L² + (r0 − r1)²). Any one unit of length.
 *
 * @source elementary geometry.
 */
export function sideArea(r0: Metre, r1: Metre, length: Metre): SquareMetre {
  return Math.PI * (r0 + r1) * Math.hypot(length, r0 - r1);
}

/**
 * Resistance from end to end of a cut cone filled with cytoplasm: Ri·L / (π·r0·r1), exact for a linear taper as far as
 * current runs along the axis.
 *
 * @param axial Ω·m.
 * @source the integral of Ri / (π·r²) over a linear r; Rall (1959), Exp. Neurol. 1:491-527 treats the cable as
 *         one-dimensional (from memory).
 */
export function axialResistance(axial: number, r0: Metre, r1: Metre, length: Metre): Ohm {
  return (axial * length) / (Math.PI * r0 * r1);
}
