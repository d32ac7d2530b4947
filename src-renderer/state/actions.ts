// Every action of the window, once: the keyboard, the command palette, the key help and the shell's menu read it.
import type { ShellCommand } from '../../src-main/contract/bridge.ts';
import { area } from './area.svelte.ts';
import { areas } from './areas.ts';
import { camera } from './camera.svelte.ts';
import { cursor } from './cursor.svelte.ts';
import { estimate } from './estimate.svelte.ts';
import { chooseNotebook } from './files.ts';
import { notebook } from './notebook.svelte.ts';
import { overlays } from './overlays.svelte.ts';
import { placeProbe } from './probes.ts';
import { plan } from './plan.svelte.ts';
import { rehearsal } from './rehearsal.svelte.ts';
import { selection } from './selection.svelte.ts';
import { swcImport } from './swc-import.svelte.ts';
import { theme } from './theme.svelte.ts';

export interface Action {
  readonly words: string;
  /** As KeyboardEvent.key, lower case, after "mod+" and "shift+"; empty when it has no key. */
  readonly key: string;
  /** Also works while a field is being typed in. */
  readonly inFields?: boolean;
  readonly group: 'Plan' | 'Areas' | 'Looking' | 'Notebook' | 'Help';
  readonly run: () => void;
}

const sweeps = (): number => estimate.check?.sweeps ?? 1;
const duration = (): number => estimate.check?.sweepDuration_ms ?? 100;

export const actions: readonly Action[] = [
  { words: 'Rehearse', key: ' ', group: 'Plan', run: () => void rehearsal.start() },
  { words: 'Stop the rehearsal', key: '', group: 'Plan', run: () => rehearsal.cancel() },
  { words: 'Undo', key: 'mod+z', group: 'Plan', run: () => plan.undo() },
  { words: 'Redo', key: 'mod+shift+z', group: 'Plan', run: () => plan.redo() },
  { words: 'Place a probe', key: 'p', group: 'Plan', run: placeProbe },
  { words: 'Duplicate the plan', key: '', group: 'Plan', run: () => void notebook.duplicatePlan() },
  ...areas.map((name, i): Action => ({
    words: `Open ${name}`,
    key: `mod+${i + 1}`,
    inFields: true,
    group: 'Areas',
    run: () => area.show(name),
  })),
  { words: 'Next sweep', key: 'arrowright', group: 'Looking', run: () => cursor.stepSweep(1, sweeps()) },
  { words: 'Previous sweep', key: 'arrowleft', group: 'Looking', run: () => cursor.stepSweep(-1, sweeps()) },
  { words: 'Step time back', key: ',', group: 'Looking', run: () => cursor.stepTime(-duration() / 200, duration()) },
  { words: 'Step time on', key: '.', group: 'Looking', run: () => cursor.stepTime(duration() / 200, duration()) },
  { words: 'Fit the cell', key: 'f', group: 'Looking', run: () => camera.fit() },
  {
    words: 'As traced or flat',
    key: 't',
    group: 'Looking',
    run: () => camera.show(camera.layout === 'Flat' ? 'As traced' : 'Flat'),
  },
  { words: 'Select nothing', key: 'escape', group: 'Looking', run: () => selection.clear() },
  { words: 'Light or dark', key: '', group: 'Looking', run: () => theme.toggle() },
  {
    words: 'Show or hide the notebook',
    key: 'mod+b',
    inFields: true,
    group: 'Notebook',
    run: () => overlays.toggleDrawer(),
  },
  {
    words: 'New notebook',
    key: '',
    group: 'Notebook',
    run: () => void chooseNotebook('new'),
  },
  {
    words: 'Open a notebook',
    key: '',
    group: 'Notebook',
    run: () => void chooseNotebook('open'),
  },
  {
    words: 'Save the notebook under another name',
    key: '',
    group: 'Notebook',
    run: () => void chooseNotebook('save as'),
  },
  { words: 'Import a traced cell', key: '', group: 'Notebook', run: () => swcImport.choose() },
  { words: 'Make a cell', key: '', group: 'Notebook', run: () => overlays.show({ kind: 'generate cell' }) },
  {
    words: 'Find a command',
    key: 'mod+k',
    inFields: true,
    group: 'Help',
    run: () => overlays.show({ kind: 'commands' }),
  },
  { words: 'All keys', key: '?', group: 'Help', run: () => overlays.show({ kind: 'keys' }) },
];

/** Commands that are actions of the page. */
type PageCommand = Exclude<ShellCommand, 'keep draft'>;

const byShell: Record<PageCommand, string> = {
  'new notebook': 'New notebook',
  'open notebook': 'Open a notebook',
  'save notebook as': 'Save the notebook under another name',
  'import cell': 'Import a traced cell',
  undo: 'Undo',
  redo: 'Redo',
  rehearse: 'Rehearse',
  'command palette': 'Find a command',
  keys: 'All keys',
  'toggle theme': 'Light or dark',
};

export function runShellCommand(command: PageCommand): void {
  actions.find((action) => action.words === byShell[command])?.run();
}

const isApple = navigator.userAgent.includes('Mac OS');

/** The key as people read it: "Ctrl K", "Space". */
export function keyWords(key: string): string {
  const names: Readonly<Record<string, string>> = {
    mod: isApple ? '⌘' : 'Ctrl',
    shift: 'Shift',
    ' ': 'Space',
    arrowleft: '←',
    arrowright: '→',
    escape: 'Esc',
  };
  if (key === ' ') return 'Space';
  return key
    .split('+')
    .map((part) => names[part] ?? part.toUpperCase())
    .join(' ');
}

/** Runs the action of a key press, if it has one and the place where it was pressed leaves it to us. */
export function runKey(event: KeyboardEvent): void {
  if (event.defaultPrevented || event.altKey) return;
  const mod = event.ctrlKey || event.metaKey;
  const bare = event.key.toLowerCase();
  const shift = event.shiftKey && (mod || bare.length > 1);
  const key = `${mod ? 'mod+' : ''}${shift ? 'shift+' : ''}${bare}`;
  const action = actions.find((a) => a.key === key && a.key !== '');
  if (action === undefined) return;
  const target = event.target instanceof Element ? event.target : null;
  if (!(action.inFields ?? false)) {
    if (target?.closest('input, textarea, select, [contenteditable]')) return;
    // On a button Space presses the button, except in the plan line, which is there to be rehearsed; arrows belong to menus, tabs and separators.
    if (key === ' ' && target?.closest('button, summary, a') && !target.closest('[data-space=rehearses]')) return;
    if (target?.closest('[role=menu], [role=separator], [role=tablist], [data-arrows]') && key.startsWith('arrow'))
      return;
  }
  event.preventDefault();
  action.run();
}
