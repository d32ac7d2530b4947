import { utilityProcess } from 'electron';
import type { EngineMessage } from '../../contract/requests.ts';
import type { StartEngine } from '../engine-client.ts';

/** Starts the engine as Electron's own kind of child process. */
export function startWithUtilityProcess(enginePath: string): StartEngine {
  return (notebookPath) => {
    const child = utilityProcess.fork(enginePath, [notebookPath], { serviceName: 'Holdfast engine' });
    return {
      send: (call) => child.postMessage(call),
      onMessage: (listener) => void child.on('message', (message) => listener(message as EngineMessage)),
      onExit: (listener) => void child.once('exit', (code) => listener(`exit code ${code}`)),
      stop: () => void child.kill(),
    };
  };
}
