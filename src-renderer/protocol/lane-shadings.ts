import type { PlanDocument } from '../../src-main/contract/documents.ts';
import type { Shading } from '../charts/series.ts';
import { judgedWindow, windowSpan, type DrawnSweep } from './lane-drawing.ts';

/** Per lane: the window clamp error is judged in, and the windows of its readings, as they lie in one sweep. */
export function laneShadings(plan: PlanDocument, sweep: DrawnSweep): Record<string, Shading[]> {
  const found: Record<string, Shading[]> = {};
  for (const lane of sweep.lanes) {
    const list: Shading[] = [];
    const judged = lane.unit === 'mV' ? judgedWindow(plan, lane.pipette) : null;
    const span = judged?.lane === lane.pipette ? windowSpan(judged, sweep) : null;
    if (span) list.push({ axis: 'x', from: span.from_ms, to: span.to_ms, label: '', token: '--accent', isFaint: true });
    for (const reading of plan.protocol.readings) {
      const read = reading.pipette === lane.pipette ? windowSpan(reading.window, sweep) : null;
      const token = lane.pipette === 'A' ? '--a' : '--b';
      if (read) list.push({ axis: 'x', from: read.from_ms, to: read.to_ms, label: '', token });
    }
    found[lane.pipette] = list;
  }
  return found;
}
