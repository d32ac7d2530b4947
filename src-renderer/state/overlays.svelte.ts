// What lies over the window: one dialog at a time, and the notebook drawer.
import { recall, remember } from './remembered.ts';

export type OpenDialog =
  | { readonly kind: 'keys' }
  | { readonly kind: 'commands' }
  | { readonly kind: 'choose notebook'; readonly what: 'new' | 'open' | 'save as' }
  | { readonly kind: 'generate cell' }
  | { readonly kind: 'import report' }
  | { readonly kind: 'add channel'; readonly region: string }
  | { readonly kind: 'session'; readonly sessionId: number }
  | { readonly kind: 'formula'; readonly topic: string };

class OverlaysState {
  dialog = $state.raw<OpenDialog | null>(null);
  /** Null: the user never chose; then it is open where there is room beside the work. */
  #drawer = $state<boolean | null>(null);
  isWide = $state(window.innerWidth >= 1440);
  readonly isDrawerOpen = $derived(this.#drawer ?? this.isWide);

  constructor() {
    const query = window.matchMedia('(min-width: 1440px)');
    query.addEventListener('change', () => (this.isWide = query.matches));
    const stored = recall('drawer');
    // Over the work it would greet the user with a covered cell: only the wide window remembers.
    if (this.isWide && stored !== null) this.#drawer = stored === 'open';
  }

  show(dialog: OpenDialog): void {
    this.dialog = dialog;
  }
  close(): void {
    this.dialog = null;
  }
  setDrawer(isOpen: boolean): void {
    this.#drawer = isOpen;
    if (this.isWide) remember('drawer', isOpen ? 'open' : 'closed');
  }
  toggleDrawer(): void {
    this.setDrawer(!this.isDrawerOpen);
  }
}

export const overlays = new OverlaysState();
