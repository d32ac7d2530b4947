import type { PipetteLetter, ProtocolDocument } from '../../src-main/contract/documents.ts';
import { ladderPlace } from '../charts/paint.ts';
import type { Series } from '../charts/series.ts';
import { drawSweep, type DrawnLane } from './lane-drawing.ts';
import { rungsOf } from './ladder-rungs.ts';

/** More lines than this cannot be told apart on a lane; beyond it an even choice is drawn. */
const mostDrawn = 60;

function token(letter: PipetteLetter): { token: string } {
  return { token: letter === 'A' ? '--a' : '--b' };
}

function drawnRungs(rungs: number, selected: number): number[] {
  const step = Math.max(1, Math.ceil(rungs / mostDrawn));
  const list: number[] = [];
  for (let rung = 0; rung < rungs; rung += step) list.push(rung);
  if (!list.includes(rungs - 1)) list.push(rungs - 1);
  if (!list.includes(selected)) list.push(selected);
  return list;
}

function isSame(a: DrawnLane, b: DrawnLane): boolean {
  return (
    a.time_ms.length === b.time_ms.length &&
    a.time_ms.every((time, i) => time === b.time_ms[i]) &&
    a.level.every((level, i) => level === b.level[i])
  );
}

/**
 * One pipette's command in every sweep, or in the selected one alone. A lane that is the same in all of them is one line
 * in the pipette's own hue.
 */
export function laneSeries(
  protocol: ProtocolDocument,
  letter: PipetteLetter,
  selectedRung: number,
  isAlone: boolean,
): Series[] {
  const rungs = rungsOf(protocol);
  const stroke = letter === 'A' ? 'solid' : 'dashed';
  const laneOf = (rung: number): DrawnLane | undefined =>
    drawSweep(protocol, rung).lanes.find((lane) => lane.pipette === letter);
  const selected = laneOf(selectedRung);
  if (!selected) return [];
  const series = (lane: DrawnLane, rung: number, paint: Series['paint'], isSelected: boolean): Series => ({
    key: String(rung),
    label: `${letter} sweep ${rung + 1}`,
    x: lane.time_ms,
    y: lane.level,
    paint,
    stroke,
    drawn: 'line',
    selected: isSelected,
    quiet: !isSelected,
  });
  const others = isAlone
    ? []
    : drawnRungs(rungs, selectedRung).flatMap((rung) => {
        const lane = laneOf(rung);
        return lane && rung !== selectedRung && !isSame(lane, selected) ? [{ lane, rung }] : [];
      });
  if (others.length === 0) return [series(selected, selectedRung, token(letter), true)];
  const paint = (rung: number): Series['paint'] => ({
    sweeps: letter === 'A' ? 'a' : 'b',
    at: ladderPlace(rung, rungs),
  });
  return [
    ...others.map(({ lane, rung }) => series(lane, rung, paint(rung), false)),
    series(selected, selectedRung, { sweeps: letter === 'A' ? 'a' : 'b', at: 1 }, true),
  ];
}

/** From 0 to the end of the longest sweep, ms. */
export function wholeTime(protocol: ProtocolDocument): { from: number; to: number } {
  const rungs = rungsOf(protocol);
  let longest = 0;
  for (let rung = 0; rung < Math.min(rungs, 10_000); rung += 1) {
    longest = Math.max(longest, drawSweep(protocol, rung).duration_ms);
  }
  return { from: 0, to: longest || 1 };
}
