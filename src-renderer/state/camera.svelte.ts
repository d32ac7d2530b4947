// How one looks at the cell: shared by every area, so that the cell stays where it is.
import { front, type Camera } from '../canvas/camera.ts';

export const layouts = ['As traced', 'Flat'] as const;
export type Layout = (typeof layouts)[number];

class CameraState {
  /** Null: fit the cell into whatever room there is. */
  placed = $state.raw<Camera | null>(null);
  layout = $state<Layout>('As traced');

  place(camera: Camera): void {
    this.placed = camera;
  }
  fit(): void {
    this.placed = null;
  }
  show(layout: Layout): void {
    this.layout = layout;
    this.placed = null;
  }
  /** Angles of the camera, for fitting anew without turning back. */
  get angles(): Pick<Camera, 'yaw' | 'pitch'> {
    return this.placed ?? front;
  }
}

export const camera = new CameraState();
