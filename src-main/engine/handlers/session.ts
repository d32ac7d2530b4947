import { createSession, readSession, writeSession } from '../../notebook/sessions.ts';
import type { Handlers } from '../handlers.ts';

export const sessionHandlers = {
  'session create': ({ cellId, date, title }, desk) => ({
    sessionId: createSession(desk.notebook, cellId, date, title),
  }),
  'session write': ({ sessionId, title, notes, notebook }, desk) => ({
    savedAt: writeSession(desk.notebookAt(notebook), sessionId, title, notes),
  }),
  'session read': ({ sessionId }, desk) => readSession(desk.notebook, sessionId),
} satisfies Partial<Handlers>;
