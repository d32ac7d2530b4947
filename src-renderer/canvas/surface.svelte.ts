// A canvas that fits its place in device pixels and is redrawn at most once a frame.
import type { Attachment } from 'svelte/attachments';
import type { Size } from './camera.ts';

/**
 * Sizes the canvas, and paints the scene in the next frame whenever it changed.
 *
 * @param scene everything that is painted; read as state, so it must not paint itself.
 */
export function surface<S>(
  resized: (size: Size) => void,
  scene: () => S,
  paint: (context: CanvasRenderingContext2D, size: Size, scene: S) => void,
): Attachment<HTMLCanvasElement> {
  return (canvas) => {
    const context = canvas.getContext('2d');
    if (context === null) throw new Error('this browser gives no 2D canvas');
    let frame = 0;
    let newest = scene();

    const draw = (): void => {
      const { clientWidth: width, clientHeight: height } = canvas;
      if (width === 0 || height === 0) return;
      const ratio = window.devicePixelRatio;
      const across = Math.round(width * ratio);
      const down = Math.round(height * ratio);
      if (canvas.width !== across || canvas.height !== down) {
        canvas.width = across;
        canvas.height = down;
      }
      context.setTransform(ratio, 0, 0, ratio, 0, 0);
      context.clearRect(0, 0, width, height);
      paint(context, { width, height }, newest);
    };
    const schedule = (): void => {
      cancelAnimationFrame(frame);
      frame = requestAnimationFrame(draw);
    };
    const fit = new ResizeObserver(() => {
      resized({ width: canvas.clientWidth, height: canvas.clientHeight });
      schedule();
    });
    fit.observe(canvas);
    $effect(() => {
      newest = scene();
      schedule();
    });
    // The face may arrive after the first painting.
    void document.fonts.ready.then(schedule);
    return () => {
      fit.disconnect();
      cancelAnimationFrame(frame);
    };
  };
}
