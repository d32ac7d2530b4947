import type { PipetteLetter, ProtocolDocument } from '../../src-main/contract/documents.ts';
import type { ReadingForecast } from '../../src-main/contract/results.ts';
import type { Axis, Series } from '../charts/series.ts';
import { numberUnit, numberWords } from '../protocol/ladder-rungs.ts';
import { familyScale, orZero } from '../text/rounding.ts';

/** What the family is drawn against: what the first ladder sets, or the sweep's number without a ladder. */
export function familyAxis(protocol: ProtocolDocument): Axis {
  const ladder = protocol.ladders[0];
  if (!ladder) return { words: 'sweep', unit: '' };
  const lane = protocol.lanes.find((one) => one.pipette === ladder.lane);
  const unit = numberUnit(ladder.number, lane?.unit ?? 'mV');
  return { words: numberWords(ladder.number) + (unit === 'mV' ? ' on the dial' : ''), unit };
}

interface FamilyPoint {
  readonly x: number;
  readonly sweep: number;
}

/** Sweeps in the order of their ladder value; without a ladder in their own. */
export function familyOrder(reading: ReadingForecast): FamilyPoint[] {
  const hasLadder = reading.ladderValue.some((value) => Number.isFinite(value));
  return Array.from(reading.recorded, (_, sweep) => ({
    sweep,
    x: hasLadder ? (reading.ladderValue[sweep] ?? NaN) : sweep + 1,
  }))
    .filter((point) => Number.isFinite(point.x))
    .sort((a, b) => a.x - b.x || a.sweep - b.sweep);
}

/** Recorded and true against the ladder; or their difference where `asBias`. */
export function familySeries(reading: ReadingForecast, letter: PipetteLetter, asBias: boolean): Series[] {
  const order = familyOrder(reading);
  const x = order.map((point) => point.x);
  const hue = { token: letter === 'A' ? '--a' : '--b' };
  const scale = familyScale(reading.recorded, reading.truth);
  const recorded = order.map((point) => orZero(reading.recorded[point.sweep] ?? NaN, scale));
  const { truth } = reading;
  const common = { x, stroke: letter === 'A' ? 'solid' : 'dashed', drawn: 'line and points', paint: hue } as const;
  if (truth && asBias) {
    const y = order.map((point, i) => orZero((recorded[i] ?? NaN) - orZero(truth[point.sweep] ?? NaN, scale), scale));
    return [{ ...common, key: 'bias', label: 'recorded − true', y }];
  }
  const series: Series[] = [{ ...common, key: 'recorded', label: `recorded by ${letter}`, y: recorded }];
  if (truth) {
    const y = order.map((point) => orZero(truth[point.sweep] ?? NaN, scale));
    series.push({
      key: 'true',
      label: 'true',
      x,
      y,
      stroke: 'dotted',
      drawn: 'line',
      paint: { token: '--ink' },
      selected: true,
    });
  }
  return series;
}
