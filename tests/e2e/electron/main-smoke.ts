// The application as shipped, but for one line: its engine runs under the Node named in ENGINE_NODE, since the old test
// runtime cannot load better-sqlite3.
import { startApp } from '../../../src-main/shells/electron/app.ts';
import { startWithNode } from '../../../src-main/shells/start-with-node.ts';

const node = process.env['ENGINE_NODE'];
if (!node) throw new Error('ENGINE_NODE names no Node binary');
startApp((enginePath) => startWithNode(process.env['ENGINE_FILE'] ?? enginePath, node));
