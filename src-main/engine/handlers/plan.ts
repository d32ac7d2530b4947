import type { OpenedPlan } from '../../contract/requests.ts';
import { keepCell } from '../../notebook/cells.ts';
import { createPlan, keepDraft, keepNamed, readPlan, rememberOpenPlan, removePlan } from '../../notebook/plans.ts';
import { rehearsalsOfPlan } from '../../notebook/rehearsals.ts';
import type { Desk } from '../desk.ts';
import type { Handlers } from '../handlers.ts';
import { written } from '../written.ts';

export const planHandlers = {
  'plan create': ({ plan, cellId }, desk) => {
    const cell = written(plan.cell);
    const owner = cellId ?? keepCell(desk.notebook, cell);
    return opened(desk, createPlan(desk.notebook, owner, written(plan), cell));
  },
  'plan open': ({ planId }, desk) => {
    const plan = opened(desk, planId);
    rememberOpenPlan(desk.notebook, planId);
    return plan;
  },
  'plan keep draft': ({ planId, plan, notebook }, desk) => ({
    savedAt: keepDraft(desk.notebookAt(notebook), planId, written(plan), written(plan.cell)),
  }),
  'plan name': ({ planId, name }, desk) => {
    const plan = { ...readPlan(desk.notebook, planId).plan, name };
    keepNamed(desk.notebook, planId, written(plan), written(plan.cell));
    return { planId };
  },
  'plan remove': ({ planId, removed }, desk) => {
    removePlan(desk.notebook, planId, removed);
    return { planId };
  },
  'plan check': ({ plan }, desk) => desk.pool.run('short', 'check', { plan }),
  'estimate passive': ({ plan }, desk) => desk.pool.run('short', 'estimate', { plan }),
} satisfies Partial<Handlers>;

function opened(desk: Desk, planId: number): OpenedPlan {
  return { ...readPlan(desk.notebook, planId), rehearsals: rehearsalsOfPlan(desk.notebook, planId) };
}
