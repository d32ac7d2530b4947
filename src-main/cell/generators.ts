// Example cells by rule: what a generator makes is an SWC text, read back like any other file.
import type { Generator } from '../contract/documents.ts';
import type { GrownSample, Growth } from './growth.ts';
import { granule, interneuron, pyramidal, round } from './grown-cells.ts';
import { seededStream, type Stream } from './seeded.ts';

type CellType = Extract<Generator, { kind: 'tree' }>['cellType'];

const growers: Record<CellType, (stream: Stream) => Growth> = {
  'layer-5-like pyramidal': pyramidal,
  'fast interneuron': interneuron,
  'granule-like': granule,
  round,
};

/**
 * The SWC text of a generated cell, the same for the same numbers. Lengths and diameters both scale with `size`.
 *
 * @source proportions: common practice for the kind of cell; nothing is taken from a traced cell.
 */
export function generatedSwc(generator: Generator): string {
  switch (generator.kind) {
    case 'sphere':
      return swcText('a sphere', [{ type: 1, point: [0, 0, 0], radius: generator.diameter_um / 2, parent: -1 }]);
    case 'ball-and-stick': {
      const soma = generator.somaDiameter_um / 2;
      const stick = generator.stickDiameter_um / 2;
      return swcText('a sphere with one cylinder', [
        { type: 1, point: [0, 0, 0], radius: soma, parent: -1 },
        { type: 3, point: [0, soma, 0], radius: stick, parent: 0 },
        { type: 3, point: [0, soma + generator.stickLength_um, 0], radius: stick, parent: 1 },
      ]);
    }
    case 'tree': {
      const { cellType, seed, size } = generator;
      const { samples } = growers[cellType](seededStream(seed));
      const scaled = samples.map(({ type, point: [x, y, z], radius, parent }): GrownSample => {
        const point = [x * size, y * size, z * size].map(thousandth) as [number, number, number];
        return { type, point, radius: thousandth(radius * size), parent };
      });
      return swcText(`a ${cellType} cell, seed ${seed}, size ${size}`, scaled);
    }
  }
}

function thousandth(value: number): number {
  return Math.round(value * 1000) / 1000;
}

function swcText(what: string, samples: readonly GrownSample[]): string {
  const head = [
    `# Holdfast generator: ${what}`,
    '# Invented: no traced cell stands behind it. Lengths in micrometres.',
  ];
  const rows = samples.map(({ type, point, radius, parent }, i) =>
    [i + 1, type, ...point, radius, parent < 0 ? -1 : parent + 1].join(' '),
  );
  return [...head, ...rows, ''].join('\n');
}
