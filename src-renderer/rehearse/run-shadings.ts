import type { ProtocolDocument } from '../../src-main/contract/documents.ts';
import type { Forecast } from '../../src-main/contract/results.ts';
import type { Shading } from '../charts/series.ts';
import { drawSweep, windowSpan } from '../protocol/lane-drawing.ts';

/** Per pipette: its readings' windows in one sweep, and the window clamp error was judged in. */
export function runShadings(
  protocol: ProtocolDocument,
  forecast: Forecast | null,
  sweep: number,
): Partial<Record<string, Shading[]>> {
  const drawn = drawSweep(protocol, sweep);
  const found: Partial<Record<string, Shading[]>> = {};
  for (const reading of protocol.readings) {
    const span = windowSpan(reading.window, drawn);
    if (!span) continue;
    const token = reading.pipette === 'A' ? '--a' : '--b';
    const list = (found[reading.pipette] ??= []);
    list.push({ axis: 'x', from: span.from_ms, to: span.to_ms, label: reading.name, token });
  }
  const judged = forecast?.clamp?.sweeps.find((one) => one.sweep === sweep);
  if (forecast?.clamp && judged) {
    const list = (found[forecast.clamp.pipette] ??= []);
    list.push({
      axis: 'x',
      from: judged.windowStart_ms,
      to: judged.windowEnd_ms,
      label: '',
      token: '--accent',
      isFaint: true,
    });
  }
  return found;
}
