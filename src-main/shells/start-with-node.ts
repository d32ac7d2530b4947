import { fork } from 'node:child_process';
import type { EngineMessage } from '../contract/requests.ts';
import type { StartEngine } from './engine-client.ts';

/** After this long a kill ends an engine that did not go by itself when its line was cut. */
const patience_ms = 2000;

/** Starts the engine under a Node binary. 'advanced' keeps typed arrays typed. */
export function startWithNode(enginePath: string, execPath: string = process.execPath): StartEngine {
  return (notebookPath) => {
    const child = fork(enginePath, [notebookPath], {
      execPath,
      execArgv: [],
      serialization: 'advanced',
      // A group of its own, or Ctrl+C in the terminal would kill it before the shell could end it in order.
      detached: process.platform !== 'win32',
    });
    const exited = new Promise<string>((resolve) => {
      child.once('exit', (code, signal) => resolve(code === null ? String(signal) : `exit code ${code}`));
      // Without a listener a failed start, or a call sent just as the engine dies, would end the shell.
      child.on('error', (cause) => {
        if (child.pid === undefined) resolve(cause.message);
      });
    });
    return {
      send: (call) => void child.send(call, () => undefined),
      onMessage: (listener) => void child.on('message', (message) => listener(message as EngineMessage)),
      onExit: (listener) => void exited.then(listener),
      stop: () => {
        if (child.connected) child.disconnect();
        const timer = setTimeout(() => child.kill('SIGKILL'), patience_ms);
        void exited.then(() => clearTimeout(timer));
      },
    };
  };
}
