import type { Answer, Answers, EngineEvent, Question, RequestName } from './requests.ts';

export interface FolderListing {
  /** Below the start folder, "/"-separated; "" is the start folder itself. */
  readonly folder: string;
  readonly folders: readonly string[];
  readonly files: readonly string[];
}

/** What a shell puts into the window as `window.holdfast`, or the page builds for itself in the browser shell. */
export interface Bridge {
  readonly shell: 'electron' | 'browser';
  ask<N extends RequestName>(name: N, question: Question<N>): Promise<Answer<Answers[N]>>;
  /** Calls back for every engine event until the returned function is called. */
  onEvent(listener: (event: EngineEvent) => void): () => void;
  /** Menu and shortcut commands of the shell, such as "new notebook", "undo". */
  onCommand(listener: (command: ShellCommand) => void): () => void;
  /** Electron: the platform's dialog, a path or null. Browser shell: null; the page lists folders itself. */
  chooseNotebook(what: 'open' | 'save', suggestion: string): Promise<string | null>;
  /** Browser shell only: notebooks and folders below the start folder. */
  listFolder(folder: string): Promise<Answer<FolderListing>>;
}

export const shellCommands = [
  'new notebook',
  'open notebook',
  'save notebook as',
  'import cell',
  'undo',
  'redo',
  'rehearse',
  'command palette',
  'keys',
  'toggle theme',
  /** Another notebook is about to take this one's place. */
  'keep draft',
] as const;
export type ShellCommand = (typeof shellCommands)[number];
