import { keepCell, readCell, removeCell } from '../../notebook/cells.ts';
import type { Handlers } from '../handlers.ts';
import { written } from '../written.ts';

export const cellHandlers = {
  'cell import': ({ name, bytes }, desk) => desk.pool.run('short', 'import cell', { name, bytes }),
  'cell keep': ({ cell }, desk) => ({ cellId: keepCell(desk.notebook, written(cell)) }),
  'cell read': ({ cellId }, desk) => ({ cellId, cell: readCell(desk.notebook, cellId) }),
  'cell drawing': ({ cell, sites }, desk) => desk.pool.run('short', 'drawing', { cell, sites }),
  'cell remove': ({ cellId, removed }, desk) => {
    removeCell(desk.notebook, cellId, removed);
    return { cellId };
  },
} satisfies Partial<Handlers>;
