// Example cells by rule: what a generator makes is an SWC text, read back like any other file.
import type { Generator } from '../contract/documents.ts';

/** The SWC text of a generated cell: the same for the same numbers. */
export function generatedSwc(generator: Generator): string {
  switch (generator.kind) {
    case 'sphere':
      return swcText('a sphere', [[1, 0, 0, 0, generator.diameter_um / 2, -1]]);
    case 'ball-and-stick': {
      const soma = generator.somaDiameter_um / 2;
      const stick = generator.stickDiameter_um / 2;
      return swcText('a sphere with one cylinder', [
        [1, 0, 0, 0, soma, -1],
        [3, 0, soma, 0, stick, 1],
        [3, 0, soma + generator.stickLength_um, 0, stick, 2],
      ]);
    }
    case 'tree':
      return swcText(`a ${generator.cellType} cell, seed ${generator.seed}`, [[1, 0, 0, 0, 6.5 * generator.size, -1]]);
  }
}

type Row = readonly [type: number, x: number, y: number, z: number, radius: number, parent: number];

function swcText(what: string, rows: readonly Row[]): string {
  const head = `# Holdfast generator: ${what}. Invented, not a traced cell.\n`;
  return head + rows.map((row, i) => `${i + 1} ${row.join(' ')}\n`).join('');
}
