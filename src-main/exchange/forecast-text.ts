// A forecast as a terminal shows it: the figures one would ask for first, in words and short tables.
import type { ClampForecast, Forecast, ReadingForecast, StoredRehearsal } from '../contract/results.ts';
import { plain, withUnit } from '../units/format.ts';

/**
 * The forecast in some twenty lines: reach, trust distance, access error, their numerical uncertainty, attenuation,
 * recorded against true by sweep, and the notes.
 */
export function forecastText({ summary, forecast }: StoredRehearsal): string {
  const { clamp } = forecast;
  const size = `${counted(summary.sweeps, 'sweep')}, ${counted(summary.compartments, 'compartment')}`;
  return [
    `${summary.planName}: ${size}, step ${withUnit(summary.step_us, 'µs')}, ${withUnit(summary.wall_s, 's')}`,
    '',
    ...(clamp ? clampLines(clamp, forecast.numerical) : []),
    ...attenuationLines(forecast),
    ...forecast.readings.flatMap(readingLines),
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
    ['Access error', withUnit(clamp.accessError_mV, 'mV')],
    [
      'Numerical uncertainty',
      known
        ? `${withUnit(numerical.clampError_mV, 'mV', 2)} of clamp error, ${percent(numerical.reach)} of reach`
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
  // A true value a millionth of the family's largest is rounding: a share of it says nothing.
  const least = (truth ?? recorded).reduce((most, each) => Math.max(most, Math.abs(each) || 0), 0) * 1e-6;
  const rows = Array.from(recorded, (value, i) => {
    const own = truth?.[i] ?? NaN;
    const bias = Math.abs(own) > least ? ((value - own) / Math.abs(own)) * 100 : NaN;
    return [String(i + 1), plain(ladderValue[i] ?? NaN), plain(value), plain(own), plain(bias, 2)];
  });
  const head = ['sweep', 'ladder', 'recorded', 'true', 'bias %'];
  return [`${name}, ${unit}`, ...[head, ...rows].map((row) => row.map((text) => text.padStart(11)).join('')), ''];
}

function percent(share: number): string {
  return withUnit(share * 100, '%', 3);
}

function counted(count: number, thing: string): string {
  return `${count} ${thing}${count === 1 ? '' : 's'}`;
}
