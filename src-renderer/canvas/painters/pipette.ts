// Paints a pipette: a tapering shaft with its tip on the cell, a lettered head, two lines of text.
import { headRadius, type PipettePlace } from '../pipette-place.ts';
import type { Size } from '../camera.ts';

export interface PipettePaint {
  readonly place: PipettePlace;
  readonly stroke: string;
  readonly fill: string;
  readonly ink: string;
  readonly ink2: string;
  readonly canvas: string;
  readonly isSelected: boolean;
  readonly accent: string;
  /** Where it is, and one figure of it. */
  readonly title: string;
  readonly note: string;
  readonly font: string;
}

/** A solid, B dashed: the difference does not rest on colour. */
const dashes = { A: [], B: [6, 3] } as const;

export function paintPipette(context: CanvasRenderingContext2D, paint: PipettePaint, size: Size): void {
  const { tip, head, letter } = paint.place;
  const length = Math.hypot(head.x - tip.x, head.y - tip.y) || 1;
  const ux = (head.x - tip.x) / length;
  const uy = (head.y - tip.y) / length;
  const side = (along: number, aside: number): [number, number] => [
    tip.x + ux * along - uy * aside,
    tip.y + uy * along + ux * aside,
  ];
  context.save();
  context.setLineDash([...dashes[letter]]);
  context.strokeStyle = paint.stroke;
  context.fillStyle = paint.fill;
  context.lineWidth = paint.isSelected ? 2.4 : 1.6;
  context.lineCap = 'butt';
  context.beginPath();
  context.moveTo(...side(length, 8));
  context.lineTo(...side(2, 1));
  context.lineTo(...side(2, -1));
  context.lineTo(...side(length, -8));
  context.globalAlpha = 0.85;
  context.fill();
  context.globalAlpha = 1;
  context.stroke();
  context.beginPath();
  context.arc(head.x, head.y, headRadius, 0, 2 * Math.PI);
  context.fill();
  context.stroke();
  context.setLineDash([]);
  if (paint.isSelected) ring(context, paint);
  context.fillStyle = paint.stroke;
  context.font = `600 12px ${paint.font}`;
  context.textAlign = 'center';
  context.textBaseline = 'middle';
  context.fillText(letter, head.x, head.y + 0.5);
  label(context, paint, size);
  context.restore();
}

function ring(context: CanvasRenderingContext2D, paint: PipettePaint): void {
  context.strokeStyle = paint.accent;
  context.lineWidth = 2;
  context.beginPath();
  context.arc(paint.place.head.x, paint.place.head.y, headRadius + 4, 0, 2 * Math.PI);
  context.stroke();
}

/** Beside B's head, under A's; moved inward where it would be cut. Haloed, so that branches do not cross the words. */
function label(context: CanvasRenderingContext2D, paint: PipettePaint, size: Size): void {
  const { head, tip } = paint.place;
  context.textAlign = 'left';
  context.font = `600 12px ${paint.font}`;
  const width = Math.max(context.measureText(paint.title).width, 60);
  const isBeside = head.x > tip.x && head.x + 16 + width < size.width - 8;
  const x = Math.max(8, Math.min(size.width - width - 8, isBeside ? head.x + 16 : head.x - headRadius));
  const y = isBeside ? head.y - 5 : head.y + 22;
  write(context, paint, paint.title, paint.ink, `600 12px ${paint.font}`, x, y);
  write(context, paint, paint.note, paint.ink2, `400 11px ${paint.font}`, x, y + 15);
}

function write(
  context: CanvasRenderingContext2D,
  paint: PipettePaint,
  words: string,
  colour: string,
  font: string,
  x: number,
  y: number,
): void {
  context.font = font;
  context.lineJoin = 'round';
  context.lineWidth = 3;
  context.strokeStyle = paint.canvas;
  context.strokeText(words, x, y);
  context.fillStyle = colour;
  context.fillText(words, x, y);
}
