// Which figure's definition the details show.
import { cursor } from '../state/cursor.svelte.ts';
import { selection } from '../state/selection.svelte.ts';
import type { Topic } from './definitions.ts';

class NoteState {
  topic = $state<Topic>('clamp error');

  /** Shows a figure's definition in the details; of a reading, when the figure is one's. */
  show(topic: Topic, reading: string | null = null): void {
    this.topic = topic;
    selection.select(reading === null ? { kind: 'sweep', sweep: cursor.sweep } : { kind: 'reading', reading });
  }
}

export const note = new NoteState();
