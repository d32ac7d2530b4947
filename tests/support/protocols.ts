// Small protocols for tests; the schema fills in what a test does not care about.
import { protocolSchema, type Block, type ProtocolDocument } from '../../src-main/contract/documents.ts';

/** A one-lane voltage-clamp protocol of the given blocks; `rest` replaces or adds fields. */
export function clampProtocol(blocks: readonly Block[], rest: Record<string, unknown> = {}): ProtocolDocument {
  return protocolSchema.parse({
    kind: 'protocol',
    format: 1,
    name: 'test',
    sampling_us: 20,
    sweepInterval_ms: 10_000,
    lanes: [{ pipette: 'A', unit: 'mV', holding: -70, blocks }],
    ...rest,
  });
}

export const hold = (id: string, duration_ms: number): Block => ({ kind: 'hold', id, duration_ms });
export const step = (id: string, duration_ms: number, level: number): Block => ({
  kind: 'step',
  id,
  duration_ms,
  level,
});
export const ramp = (id: string, duration_ms: number, from: number, to: number): Block => ({
  kind: 'ramp',
  id,
  duration_ms,
  from,
  to,
});
