// What a region's membrane and cytoplasm are made of, in SI.
import type { ChannelDocument, MakeUpDocument } from '../contract/documents.ts';
import type { RefusalData } from '../contract/refusal.ts';
import { toSi, type Volt } from '../units/si.ts';
import type { Region } from './regions.ts';

/** The make-up's leak, as a channel. */
export const leakName = 'leak';

export interface MakeUp {
  /** F/m² of membrane, spines included in the area. */
  readonly capacitance: number;
  /** Ω·m. */
  readonly axial: number;
  /** Membrane area with spines ÷ smooth area. */
  readonly spineFactor: number;
  /** Leak first. */
  readonly channels: readonly ChannelDensity[];
}
export interface ChannelDensity {
  readonly channel: string;
  /** S/m² of membrane. */
  readonly density: number;
  /** NaN: the stored channel's own, which this layer does not know. */
  readonly reversal: Volt;
}

/**
 * The make-up of every region, in the order of `regions`. Faults go to `faults`: a make-up for a region that is not there,
 * two for one region, a region without, a channel given twice.
 */
export function makeUpsOf(
  documents: readonly MakeUpDocument[],
  regions: readonly Region[],
  own: readonly ChannelDocument[],
  faults: RefusalData[],
): MakeUp[] {
  const byRegion = new Map<string, MakeUp>();
  documents.forEach((document, n) => {
    const place = `cell.makeUp[${n}]`;
    const fault = (code: RefusalData['code'], thing: string, at: string, value: string, remedy: string) =>
      faults.push({ code, thing, place: `${place}.${at}`, value, remedy });
    if (!regions.some((region) => region.name === document.region))
      fault('name-unknown', 'region of a make-up', 'region', document.region, `name one of: ${namesOf(regions)}`);
    if (byRegion.has(document.region))
      fault('name-twice', 'region of a make-up', 'region', document.region, 'give each region one make-up');
    const names = new Set([leakName]);
    document.channels.forEach(({ channel }, c) => {
      if (names.has(channel))
        fault('name-twice', 'channel', `channels[${c}].channel`, channel, 'give each channel once; "leak" is the leak');
      names.add(channel);
    });
    byRegion.set(document.region, makeUpOf(document, own));
  });
  return regions.map((region, n) => {
    const makeUp = byRegion.get(region.name);
    if (makeUp !== undefined) return makeUp;
    faults.push({
      code: 'document-field-missing',
      thing: 'make-up',
      place: `cell.regions[${n}]`,
      value: `none for ${region.name}`,
      remedy: `add a make-up for the region "${region.name}"`,
    });
    return { capacitance: NaN, axial: NaN, spineFactor: NaN, channels: [] };
  });
}

function namesOf(regions: readonly Region[]): string {
  return regions.map((region) => region.name).join(', ');
}

function makeUpOf(document: MakeUpDocument, own: readonly ChannelDocument[]): MakeUp {
  const { leak } = document;
  return {
    capacitance: toSi(document.capacitance_uF_cm2, 'uF_cm2'),
    axial: toSi(document.axialResistivity_Ohm_cm, 'Ohm_cm'),
    spineFactor: document.spineFactor,
    channels: [
      {
        channel: leakName,
        density: toSi(leak.conductance_mS_cm2, 'mS_cm2'),
        reversal: toSi(leak.reversal_mV, 'mV'),
      },
      ...document.channels.map((entry) => ({
        channel: entry.channel,
        density: toSi(entry.density_mS_cm2, 'mS_cm2'),
        reversal: entry.reversal_mV === undefined ? ownReversal(own, entry.channel) : toSi(entry.reversal_mV, 'mV'),
      })),
    ],
  };
}

/** Reversal potential of one of the cell's own channels, V; NaN for a stored one. */
export function ownReversal(own: readonly ChannelDocument[], channel: string): Volt {
  const found = own.find((candidate) => candidate.name === channel);
  return found === undefined ? NaN : toSi(found.reversal_mV, 'mV');
}
