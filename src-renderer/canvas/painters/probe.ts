// Paints a probe: a small diamond at its place with its name beside it.

export interface ProbePaint {
  readonly x: number;
  readonly y: number;
  readonly name: string;
  readonly ink: string;
  readonly canvas: string;
  readonly accent: string;
  readonly isSelected: boolean;
  readonly font: string;
}

export function paintProbe(context: CanvasRenderingContext2D, paint: ProbePaint): void {
  const { x, y } = paint;
  const r = 5;
  context.save();
  context.beginPath();
  context.moveTo(x, y - r);
  context.lineTo(x + r, y);
  context.lineTo(x, y + r);
  context.lineTo(x - r, y);
  context.closePath();
  context.fillStyle = paint.canvas;
  context.strokeStyle = paint.isSelected ? paint.accent : paint.ink;
  context.lineWidth = paint.isSelected ? 2.5 : 1.5;
  context.fill();
  context.stroke();
  context.font = `400 11px ${paint.font}`;
  context.textAlign = 'left';
  context.textBaseline = 'middle';
  context.lineJoin = 'round';
  context.lineWidth = 3;
  context.strokeStyle = paint.canvas;
  context.strokeText(paint.name, x + 9, y);
  context.fillStyle = paint.ink;
  context.fillText(paint.name, x + 9, y);
  context.restore();
}
