// Numbers that look random and are the same for the same seed.

/** A stream of numbers from a seed. */
export interface Stream {
  /** Even in [0, 1). */
  unit(): number;
  /** Even in [low, high). */
  between(low: number, high: number): number;
  /** Normal, mean 0 and standard deviation 1. */
  normal(): number;
}

/**
 * The stream of a seed from 0 to 4294967295.
 *
 * @source generator: Marsaglia (2003), Xorshift RNGs, J Stat Softw 8(14), shifts 13, 17, 5 (from memory). Normal numbers: Box and
 *         Muller (1958), Ann Math Stat 29:610-611 (from memory).
 */
export function seededStream(seed: number): Stream {
  // An odd multiplier spreads neighbouring seeds; 0 is the one state that xorshift cannot leave.
  let state = Math.imul(seed ^ 0x5bd1e995, 0x9e3779b1) >>> 0 || 1;
  const unit = () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return state / 4294967296;
  };
  for (let n = 0; n < 8; n += 1) unit();
  return {
    unit,
    between: (low, high) => low + (high - low) * unit(),
    normal: () => Math.sqrt(-2 * Math.log(1 - unit())) * Math.cos(2 * Math.PI * unit()),
  };
}
