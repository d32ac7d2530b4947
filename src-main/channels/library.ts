import { kHodgkinHuxley1952 } from './k-hodgkin-huxley-1952.ts';
import type { Kinetics } from './kinetics.ts';
import { naHodgkinHuxley1952 } from './na-hodgkin-huxley-1952.ts';

/** The published channels a cell can name without describing them, by id. */
export const storedChannels: ReadonlyMap<string, Kinetics> = new Map(
  [naHodgkinHuxley1952, kHodgkinHuxley1952].map((kinetics) => [kinetics.name, kinetics]),
);
