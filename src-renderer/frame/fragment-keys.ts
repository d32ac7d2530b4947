// Keys that every fragment of the plan line answers alike: Space rehearses (see runKey), Escape lets go of the line.
import { rehearsal } from '../state/rehearsal.svelte.ts';

/** Escape on a fragment at rest gives the focus back to the window; while a rehearsal runs, Escape stops that instead. */
export function leaveLine(event: KeyboardEvent): void {
  if (rehearsal.isRunning || !(event.currentTarget instanceof HTMLElement)) return;
  event.currentTarget.blur();
  event.preventDefault();
  event.stopPropagation();
}

/** A button is pressed when Space comes up again, in browsers where preventing the press down does not hinder it. */
export function noPressBySpace(event: KeyboardEvent): void {
  if (event.key === ' ') event.preventDefault();
}
