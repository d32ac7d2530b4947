// Structure identifiers of the SWC format in words. Source: INCF SWC specification, structure identifiers 0 to 4;
// higher numbers are the tracer's own.
const words: Readonly<Record<number, string>> = {
  0: 'undefined',
  1: 'soma',
  2: 'axon',
  3: 'basal dendrite',
  4: 'apical dendrite',
};

export function swcTypeWords(type: number): string {
  return words[type] ?? `type ${type}`;
}

/** Types a region may take: the named ones, and those it already has. */
export function offeredTypes(has: readonly number[]): readonly number[] {
  return [...new Set([1, 2, 3, 4, 0, ...has])];
}
