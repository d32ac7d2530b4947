// Light, dark, or as the system has it.
import { recall, remember } from './remembered.ts';

export const themeChoices = ['system', 'light', 'dark'] as const;
export type ThemeChoice = (typeof themeChoices)[number];

class ThemeState {
  choice = $state<ThemeChoice>(themeChoices.find((c) => c === recall('theme')) ?? 'system');
  #systemIsDark = $state(false);
  /** The theme in force. */
  readonly shown = $derived(this.choice === 'system' ? (this.#systemIsDark ? 'dark' : 'light') : this.choice);

  constructor() {
    const query = window.matchMedia('(prefers-color-scheme: dark)');
    this.#systemIsDark = query.matches;
    query.addEventListener('change', (event) => {
      this.#systemIsDark = event.matches;
    });
  }

  choose(choice: ThemeChoice): void {
    this.choice = choice;
    remember('theme', choice);
  }

  toggle(): void {
    this.choose(this.shown === 'dark' ? 'light' : 'dark');
  }
}

export const theme = new ThemeState();
