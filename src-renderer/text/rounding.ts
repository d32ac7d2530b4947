// What is rounding reads as 0. The same rule as in the terminal's tables, so that both tell one story.

/** A millionth: far below the numerical uncertainty of a rehearsal, far above the rounding of its arithmetic. */
const rounding = 1e-6;
/** pA, mV, fC: a millionth of it is 0.1 fA, 0.1 µV or less than an electron, whatever the rest of the family. */
const leastScale = 100;

/** What a family's values are measured by: the largest of them, recorded or true, but 100 of the unit at least. */
export function familyScale(...values: readonly (ArrayLike<number> | null)[]): number {
  let most = leastScale;
  for (const list of values) {
    for (let i = 0; i < (list?.length ?? 0); i += 1) most = Math.max(most, Math.abs(list?.[i] ?? 0) || 0);
  }
  return most;
}

/** The value, or 0 where it is rounding beside the scale. What is not a number stays so. */
export function orZero(value: number, scale: number): number {
  return Math.abs(value) < rounding * scale ? 0 : value;
}
