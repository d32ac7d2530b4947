// Readings, their windows, the question: changes to a plan, each a pure function of the plan.
import type { PipetteLetter, PlanDocument, Reading, Window } from '../../src-main/contract/documents.ts';
import { drawSweep, judgedWindow, type DrawnSweep } from './lane-drawing.ts';

type Edge = Window['from'];

function edgeTime(lane: PipetteLetter, edge: Edge, sweep: DrawnSweep): number | null {
  const block = sweep.lanes.find((one) => one.pipette === lane)?.blocks.find((one) => one.block.id === edge.block);
  if (!block) return null;
  return (edge.edge === 'start' ? block.from_ms : block.to_ms) + edge.offset_ms;
}

/** An edge at a time, hung on the nearest block edge of the lane. */
export function edgeAt(lane: PipetteLetter, time_ms: number, sweep: DrawnSweep): Edge | null {
  const blocks = sweep.lanes.find((one) => one.pipette === lane)?.blocks ?? [];
  let best: Edge | null = null;
  for (const { block, from_ms, to_ms } of blocks) {
    for (const [edge, at] of [
      ['start', from_ms],
      ['end', to_ms],
    ] as const) {
      const offset_ms = Number((time_ms - at).toPrecision(9));
      if (!best || Math.abs(offset_ms) < Math.abs(best.offset_ms)) best = { block: block.id, edge, offset_ms };
    }
  }
  return best;
}

/** The windows of a plan whose block was taken out, hung on what is left: same time, but within the sweep. */
export function reanchored(before: PlanDocument, after: PlanDocument, lane: PipetteLetter, gone: string): PlanDocument {
  const old = drawSweep(before.protocol, 0);
  const now = drawSweep(after.protocol, 0);
  const fixEdge = (of: PipetteLetter, edge: Edge): Edge => {
    if (of !== lane || edge.block !== gone) return edge;
    const time = Math.max(0, Math.min(now.duration_ms, edgeTime(of, edge, old) ?? 0));
    return edgeAt(of, time, now) ?? edge;
  };
  const fix = (window: Window): Window => ({
    ...window,
    from: fixEdge(window.lane, window.from),
    to: fixEdge(window.lane, window.to),
  });
  return {
    ...after,
    ...(after.clampWindow ? { clampWindow: fix(after.clampWindow) } : {}),
    protocol: {
      ...after.protocol,
      readings: after.protocol.readings.map((reading) => ({
        ...reading,
        window: fix(reading.window),
        ...(reading.baseline ? { baseline: fix(reading.baseline) } : {}),
      })),
    },
  };
}

/** The whole of one block as a window. */
export function wholeBlock(lane: PipetteLetter, block: string): Window {
  return { lane, from: { block, edge: 'start', offset_ms: 0 }, to: { block, edge: 'end', offset_ms: 0 } };
}

/** A peak reading over the block clamp error is judged in; the first one becomes the question. */
export function addReading(plan: PlanDocument, letter: PipetteLetter, id: string, block: string | null): PlanDocument {
  const lane = plan.protocol.lanes.find((one) => one.pipette === letter);
  const window = block === null ? judgedWindow(plan, letter) : wholeBlock(letter, block);
  const fallback = lane?.blocks[0];
  if (!fallback) return plan;
  const isVoltage = lane.unit === 'mV';
  const reading: Reading = {
    id,
    name: isVoltage ? 'peak current' : 'mean voltage',
    pipette: letter,
    measure: isVoltage ? 'peak' : 'mean',
    direction: 'largest',
    window: window ?? wholeBlock(letter, fallback.id),
  };
  return {
    ...plan,
    ...(plan.question ? {} : { question: { reading: id, bias_percent: 10 } }),
    protocol: { ...plan.protocol, readings: [...plan.protocol.readings, reading] },
  };
}

export function setReading(plan: PlanDocument, id: string, change: (reading: Reading) => Reading): PlanDocument {
  return {
    ...plan,
    protocol: {
      ...plan.protocol,
      readings: plan.protocol.readings.map((reading) => (reading.id === id ? change(reading) : reading)),
    },
  };
}

/** Takes a reading out; a question that asked for it goes with it. */
export function removeReading(plan: PlanDocument, id: string): PlanDocument {
  const { question, ...rest } = plan;
  return {
    ...rest,
    ...(question && question.reading !== id ? { question } : {}),
    protocol: { ...plan.protocol, readings: plan.protocol.readings.filter((reading) => reading.id !== id) },
  };
}

/** With or without a baseline window. */
export function setBaseline(plan: PlanDocument, id: string, baseline: Window | null): PlanDocument {
  return setReading(plan, id, (reading) => {
    if (baseline) return { ...reading, baseline };
    const without = { ...reading };
    delete without.baseline;
    return without;
  });
}

/** Null leaves the choice of the window to the program. */
export function setClampWindow(plan: PlanDocument, window: Window | null): PlanDocument {
  if (window) return { ...plan, clampWindow: window };
  const without = { ...plan };
  delete without.clampWindow;
  return without;
}

export function askFor(plan: PlanDocument, reading: string | null): PlanDocument {
  const { question, ...rest } = plan;
  return reading === null ? rest : { ...rest, question: { reading, bias_percent: question?.bias_percent ?? 10 } };
}
