// The one selected thing of the window. Cell, charts and details all show it.
import type { PipetteLetter, Site } from '../../src-main/contract/documents.ts';

export type Selection =
  | { readonly kind: 'nothing' }
  | { readonly kind: 'pipette'; readonly letter: PipetteLetter }
  | { readonly kind: 'lane'; readonly letter: PipetteLetter }
  | { readonly kind: 'block'; readonly lane: PipetteLetter; readonly block: string }
  | { readonly kind: 'reading'; readonly reading: string }
  | { readonly kind: 'region'; readonly region: string }
  | { readonly kind: 'sweep'; readonly sweep: number }
  | { readonly kind: 'probe'; readonly name: string }
  | { readonly kind: 'compartment'; readonly compartment: number; readonly site: Site };

class SelectionState {
  current = $state.raw<Selection>({ kind: 'nothing' });

  select(thing: Selection): void {
    this.current = thing;
  }
  selectPipette(letter: PipetteLetter): void {
    this.current = { kind: 'pipette', letter };
  }
  clear(): void {
    this.current = { kind: 'nothing' };
  }

  isPipette(letter: PipetteLetter): boolean {
    return this.current.kind === 'pipette' && this.current.letter === letter;
  }
  isBlock(lane: PipetteLetter, block: string): boolean {
    return this.current.kind === 'block' && this.current.lane === lane && this.current.block === block;
  }
  isReading(reading: string): boolean {
    return this.current.kind === 'reading' && this.current.reading === reading;
  }
  isRegion(region: string): boolean {
    return this.current.kind === 'region' && this.current.region === region;
  }
  isSweep(sweep: number): boolean {
    return this.current.kind === 'sweep' && this.current.sweep === sweep;
  }
}

export const selection = new SelectionState();
