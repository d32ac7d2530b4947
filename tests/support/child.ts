import { spawn, type ChildProcess } from 'node:child_process';
import { fileURLToPath } from 'node:url';

export interface Child {
  /** All of standard output so far. */
  readonly said: () => string;
  /** Resolves at the first output that holds `words`; rejects when the program ends before. */
  readonly says: (words: string) => Promise<void>;
  /** Ends it without warning, as a power cut would, and waits until it is gone. */
  readonly kill: () => Promise<void>;
  readonly ended: Promise<{ readonly code: number | null; readonly errors: string }>;
  readonly pid: number;
}

/** Starts a TypeScript program of the tests with this Node. `shell` may put a limit before it: "ulimit -f 100; exec". */
export function startProgram(url: URL, args: readonly string[], shell?: string): Child {
  const command = [process.execPath, fileURLToPath(url), ...args];
  const child: ChildProcess =
    shell === undefined
      ? spawn(command[0] ?? '', command.slice(1), { stdio: ['ignore', 'pipe', 'pipe'] })
      : spawn('sh', ['-c', `${shell} "$0" "$@"`, ...command], { stdio: ['ignore', 'pipe', 'pipe'] });
  let output = '';
  let errors = '';
  child.stdout?.on('data', (data: Buffer) => (output += data.toString()));
  child.stderr?.on('data', (data: Buffer) => (errors += data.toString()));
  const ended = new Promise<{ code: number | null; errors: string }>((resolve) => {
    child.once('close', (code) => resolve({ code, errors }));
  });
  return {
    said: () => output,
    says: (words) =>
      new Promise((resolve, reject) => {
        const look = () => {
          if (output.includes(words)) resolve();
        };
        child.stdout?.on('data', look);
        void ended.then(() => reject(new Error(`the program ended without saying "${words}": ${errors}`)));
        look();
      }),
    kill: async () => {
      child.kill('SIGKILL');
      await ended;
    },
    ended,
    pid: child.pid ?? -1,
  };
}
