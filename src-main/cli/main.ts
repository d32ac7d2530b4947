// The command line: finds the command, and loads nothing that it does not need.
import { programVersion } from '../engine/version.ts';

interface Command {
  readonly words: string;
  readonly load: () => Promise<(args: string[]) => number | Promise<number>>;
}

const commands: Readonly<Record<string, Command>> = {
  channels: {
    words: 'the published channels a cell can name',
    load: async () => (await import('./channels.ts')).channels,
  },
  check: {
    words: 'what a reader of cells makes of an SWC file',
    load: async () => (await import('./check.ts')).check,
  },
  rehearse: {
    words: 'runs a plan and writes what it forecasts',
    load: async () => (await import('./rehearse.ts')).rehearse,
  },
};

/** Runs one command line. @returns the exit code: 2 for a command that does not exist, else the command's own. */
export async function main(args: readonly string[]): Promise<number> {
  const [word, ...rest] = args;
  if (word === '--version') {
    console.log(programVersion);
    return 0;
  }
  if (word === '--help') {
    console.log(help());
    return 0;
  }
  const command = word !== undefined && Object.hasOwn(commands, word) ? commands[word] : undefined;
  if (!command) {
    console.error(word === undefined ? help() : `There is no command "${word}".\n\n${help()}`);
    return 2;
  }
  const run = await command.load();
  return run(rest);
}

function help(): string {
  const line = (name: string, words: string): string => `  ${name.padEnd(12)}${words}`;
  return [
    'holdfast COMMAND ...',
    '',
    ...Object.entries(commands).map(([name, { words }]) => line(name, words)),
    line('--version', 'the version of the program'),
    line('--help', 'this page'),
    '',
    'A command without arguments says what it takes.',
  ].join('\n');
}
