// The engine's own process. Electron starts it with utilityProcess.fork, every other shell with child_process.fork and
// serialization 'advanced'.
//
//     engine [--workers=N] [--worker-program=FILE] NOTEBOOK
//
// NOTEBOOK, the last argument, is opened, or made with the examples in it when nothing is there. --workers: threads for
// sweeps, one per core when absent. --worker-program: another program for the workers, for tests of their deaths.
// Calls come in as `Call`, answers and events go out as `EngineMessage` (contract/requests.ts). Bugs go to stderr.
import type { Call, EngineMessage } from '../contract/requests.ts';
import { createEngine, type EngineOptions } from './engine.ts';

interface Line {
  readonly send: (message: EngineMessage) => void;
  readonly listen: (onCall: (call: Call) => void) => void;
}

function openLine(close: () => void): Line {
  // Electron's types declare process.parentPort, but outside a utility process it is undefined.
  const port = (process as { parentPort?: Electron.ParentPort }).parentPort;
  if (port) {
    return {
      send: (message) => port.postMessage(message),
      listen: (onCall) => port.on('message', (event) => onCall(event.data as Call)),
    };
  }
  if (!process.send) throw new Error('the engine is started by a shell');
  // A shell that died must not leave the engine behind.
  process.on('disconnect', close);
  return {
    // A line cut while an answer is on its way is no fault: the disconnect ends the process.
    send: (message) => void process.send?.(message, undefined, undefined, () => undefined),
    listen: (onCall) => process.on('message', (message) => onCall(message as Call)),
  };
}

function optionsFrom(given: readonly string[]): EngineOptions {
  const notebookPath = given.at(-1);
  if (notebookPath === undefined || notebookPath.startsWith('--')) throw new Error('no notebook file named');
  const value = (name: string) => given.find((each) => each.startsWith(`--${name}=`))?.slice(name.length + 3);
  const workers = value('workers');
  const program = value('worker-program');
  return {
    notebookPath,
    ...(workers !== undefined && { workers: Number(workers) }),
    ...(program !== undefined && { workerProgram: program }),
  };
}

const engine = createEngine(optionsFrom(process.argv.slice(1)));
const close = () => void engine.close().finally(() => process.exit(0));
process.on('SIGTERM', close);
const line = openLine(close);
engine.onEvent((event) => line.send({ kind: 'event', event }));
line.listen((call) => {
  void engine.handle(call).then((answer) => line.send({ kind: 'answer', call: call.call, answer }));
});
