// holdfast check FILE.swc [--json]: what a reader of cells makes of an SWC file.
import { readSwcFile } from '../engine/swc-file.ts';
import type { SwcReport } from '../contract/results.ts';

const usage = 'usage: holdfast check FILE.swc [--json]';

/**
 * Prints outcome, codes and measures; with `--json` one object. A refusal names file, line, the line's text and the remedy
 * on standard error.
 *
 * @returns the exit code: 0 accepted or repaired, 2 refused or unreadable.
 */
export function check(args: string[]): number {
  const files = args.filter((arg) => !arg.startsWith('--'));
  const options = args.filter((arg) => arg.startsWith('--'));
  const [file, ...more] = files;
  const unknown = options.find((option) => option !== '--json') ?? more[0];
  if (file === undefined || unknown !== undefined) {
    process.stderr.write(
      `${unknown === undefined ? 'No file is named.' : `"${unknown}" is not understood.`}\n\n${usage}\n`,
    );
    return 2;
  }
  try {
    const reading = readSwcFile(file);
    const { report } = reading;
    const isRefused = reading.kind === 'refused';
    if (options.includes('--json')) {
      const line = isRefused ? { line: reading.line } : {};
      const found = { outcome: report.outcome, codes: report.codes, ...line, ...report.measures };
      process.stdout.write(`${JSON.stringify(found)}\n`);
    } else if (!isRefused) process.stdout.write(inWords(file, report));
    if (!isRefused) return 0;
    const words = reading.text === '' ? '' : `: "${reading.text.trim().slice(0, 200)}"`;
    const where = reading.line === 0 ? '' : ` line ${reading.line}${words}`;
    process.stderr.write(`${file}${where}: ${reading.code}: ${reading.remedy}\n`);
    return 2;
  } catch (error) {
    // A Refusal of the disk; anything else is a bug and keeps its stack.
    if (!(error instanceof Error) || error.name !== 'Refusal') throw error;
    process.stderr.write(`${error.message}\n`);
    return 2;
  }
}

function inWords(file: string, report: SwcReport): string {
  const findings = report.findings.map(({ code, words, count, lines }) => {
    const where = lines.length === 0 ? '' : `, line${count > 1 ? 's' : ''} ${lines.join(', ')}`;
    const more = count > lines.length && lines.length > 0 ? ', ...' : '';
    return `${code} (${count}×${where}${more}): ${words}`;
  });
  const measures = Object.entries(report.measures ?? {}).map(
    ([name, value]) => `  ${name.padEnd(22)} ${typeof value === 'number' ? Number(value.toFixed(6)) : value}`,
  );
  return [`${file}: ${report.outcome}`, ...findings, ...measures, ''].join('\n');
}
