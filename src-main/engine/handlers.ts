import type { Answers, CheckedQuestion, RequestName } from '../contract/requests.ts';
import type { Desk } from './desk.ts';
import { cellHandlers } from './handlers/cell.ts';
import { channelHandlers } from './handlers/channels.ts';
import { exchangeHandlers } from './handlers/exchange.ts';
import { notebookHandlers } from './handlers/notebook.ts';
import { planHandlers } from './handlers/plan.ts';
import { rehearsalHandlers } from './handlers/rehearsal.ts';
import { sessionHandlers } from './handlers/session.ts';

/** One for every request of the contract: one that is missing does not compile. Refusals are thrown. */
export type Handlers = {
  readonly [N in RequestName]: (question: CheckedQuestion<N>, desk: Desk) => Answers[N] | Promise<Answers[N]>;
};

export const handlers: Handlers = {
  ...notebookHandlers,
  ...cellHandlers,
  ...channelHandlers,
  ...planHandlers,
  ...sessionHandlers,
  ...rehearsalHandlers,
  ...exchangeHandlers,
};
