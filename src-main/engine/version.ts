/** As in package.json; a test holds the two together. */
export const programVersion = '0.1.0';

/** Raised whenever the same plan may give other numbers. Stands beside every stored rehearsal. */
export const engineVersion = '0.1.0';
