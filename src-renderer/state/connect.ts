// Ties the state together once, at the start: who follows the plan, who hears the engine, what the shell commands.
import { bridge } from '../bridge.ts';
import { runShellCommand } from './actions.ts';
import { area } from './area.svelte.ts';
import { selectionAtHome } from './at-home.ts';
import { channelLibrary } from './channel-library.svelte.ts';
import { cursor } from './cursor.svelte.ts';
import { drawing } from './drawing.svelte.ts';
import { estimate } from './estimate.svelte.ts';
import { jobs } from './jobs.svelte.ts';
import { notebook } from './notebook.svelte.ts';
import { notices } from './notices.svelte.ts';
import { plan } from './plan.svelte.ts';
import { ranCell } from './ran-cell.svelte.ts';
import { rehearsal } from './rehearsal.svelte.ts';
import { session } from './session.svelte.ts';
import { selection } from './selection.svelte.ts';
import { isoDay } from '../text/dates.ts';

export function connect(): void {
  plan.whenChanged((document) => {
    drawing.follow(document);
    estimate.follow(document);
    void ranCell.follow();
  });
  area.whenShown = selectAtHome;
  notebook.whenPlanShown = selectAtHome;
  notebook.beforeLeaving = () => session.keep();
  rehearsal.sessionNow = () => notebook.sessionOf(isoDay(new Date()));
  rehearsal.notebookNow = () => notebook.overview?.status.path ?? '';
  rehearsal.whenStored = () => {
    void notebook.load(false);
    void session.refresh();
  };
  rehearsal.whenShown = (stored) => {
    // The sweep that decides is looked at first.
    cursor.sweep = stored.forecast.clamp?.worstSweep ?? Math.min(cursor.sweep, stored.summary.sweeps - 1);
    void ranCell.follow();
  };
  bridge.onEvent((event) => {
    jobs.hear(event);
    rehearsal.hear(event);
    if (event.event === 'worker restarted') notices.say(`A worker was restarted: ${event.reason}`);
    if (event.event === 'engine restarted') {
      notices.fault(`The engine was restarted: ${event.reason}. What was running has ended; the notebook is whole.`);
      void notebook.load(false);
    }
  });
  bridge.onCommand((command) => {
    if (command === 'keep draft') void plan.keep();
    else runShellCommand(command);
  });
  // Leaving within the moment before a draft is kept must not lose it.
  const keepAll = (): void => {
    void plan.keep();
    void session.keep();
  };
  window.addEventListener('pagehide', keepAll);
  document.addEventListener('visibilitychange', () => {
    if (document.visibilityState === 'hidden') keepAll();
  });
  // For their titles: where curves are shown, they are asked for again at the cell's temperature.
  void channelLibrary.load(22);
  void notebook.load(true);
}

function selectAtHome(): void {
  if (!plan.isOpen) return;
  selection.select(selectionAtHome(area.open, selection.current, plan.document, cursor.sweep));
}
