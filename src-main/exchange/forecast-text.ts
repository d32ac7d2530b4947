// A forecast as a terminal shows it: the figures one would ask for first, in words and short tables.
import type { ClampForecast, Forecast, ReadingForecast, StoredRehearsal } from '../contract/results.ts';
import { plain, withUnit } from '../units/format.ts';

/** A millionth: far below the numerical uncertainty of a rehearsal, far above the rounding of its arithmetic. */
const rounding = 1e-6;
/** pA, mV, fC: a millionth of it is 0.1 fA, 0.1 µV or less than an electron, whatever the rest of the family. */
const leastScale = 100;

/**
 * The forecast in some twenty lines: reach, trust distance, access error, their numerical uncertainty, attenuation,
 * recorded against true by sweep, and the notes.
 *
 * What is rounding reads as 0: in a reading's table a value below a millionth of the family's largest, recorded or true,
 * or below 1e-4 of its unit, and a bias below a millionth of the true value; elsewhere an error below a millionth of a millivolt and a share below a
 * millionth. Where the true value itself is 0 there is no bias. Exports keep all digits.
 */
export function forecastText({ summary, forecast }: Omit<StoredRehearsal, 'plan'>): string {
  const { clamp } = forecast;
  const size = `${counted(summary.sweeps, 'sweep')}, ${counted(summary.compartments, 'compartment')}`;
  return [
    `${summary.planName}: ${size}, step ${withUnit(summary.step_us, 'µs')}, ${withUnit(summary.wall_s, 's')}`,
    '',
    ...(clamp ? clampLines(clamp, forecast.numerical) : []),
    ...attenuationLines(forecast),
    ...forecast.readings.flatMap(readingLines),
    ...forecast.cautions.map((caution) => `Caution: ${caution}`),
    ...forecast.notes.map((note) => `- ${note}`),
    '',
  ].join('\n');
}

function clampLines(clamp: ClampForecast, numerical: Forecast['numerical']): string[] {
  const tolerance = withUnit(clamp.tolerance.value, clamp.tolerance.unit);
  const known = numerical.state === 'computed' && numerical.clampError_mV !== null && numerical.reach !== null;
  const trust = clamp.trustDistance_um;
  const lines: (readonly [string, string])[] = [
    ['Reach', `${percent(clamp.reach)} of the membrane within ${tolerance}, in sweep ${clamp.worstSweep + 1}`],
    ...clamp.reachByRegion.map(
      ({ region, area_um2, reach }) => [`  ${region}`, `${percent(reach)} of ${withUnit(area_um2, 'µm²')}`] as const,
    ),
    ['Trust distance', trust === null ? 'to the tips' : `${withUnit(trust, 'µm')} from the soma`],
    ['Access error', withUnit(orZero(clamp.accessError_mV, 1), 'mV')],
    [
      'Numerical uncertainty',
      known
        ? `${withUnit(orZero(numerical.clampError_mV, 1), 'mV', 2)} of clamp error, ${percent(numerical.reach)} of reach`
        : 'not computed',
    ],
  ];
  return [...lines.map(([name, words]) => `${name.padEnd(24)}${words}`), ''];
}

function attenuationLines({ dualSite }: Forecast): string[] {
  if (!dualSite) return [];
  const { from, to, attenuationAtoB, attenuationBtoA } = dualSite;
  return [
    `${`Attenuation ${from} to ${to}`.padEnd(24)}${plain(attenuationAtoB)}`,
    `${`Attenuation ${to} to ${from}`.padEnd(24)}${plain(attenuationBtoA)}`,
    '',
  ];
}

function readingLines(reading: ReadingForecast): string[] {
  const { name, unit, recorded, truth, ladderValue } = reading;
  const largest = [...recorded, ...(truth ?? [])].reduce(
    (most, each) => Math.max(most, Math.abs(each) || 0),
    leastScale,
  );
  const rows = Array.from(recorded, (value, i) => {
    const own = orZero(truth?.[i] ?? NaN, largest);
    const bias = own === 0 ? NaN : orZero((value - own) / Math.abs(own), 1) * 100;
    return [String(i + 1), plain(ladderValue[i] ?? NaN), plain(orZero(value, largest)), plain(own), plain(bias, 2)];
  });
  const head = ['sweep', 'ladder', 'recorded', 'true', 'bias %'];
  return [`${name}, ${unit}`, ...[head, ...rows].map((row) => row.map((text) => text.padStart(11)).join('')), ''];
}

/** The value, or 0 where it is rounding beside `scale`. */
function orZero(value: number, scale: number): number {
  return Math.abs(value) < rounding * scale ? 0 : value;
}

function percent(share: number): string {
  return withUnit(orZero(share, 1) * 100, '%', 3);
}

function counted(count: number, thing: string): string {
  return `${count} ${thing}${count === 1 ? '' : 's'}`;
}
