// What pointer, wheel and keys do on the cell: pan, zoom, turn, select, drag pipettes.
import type { PipetteLetter, Site } from '../../src-main/contract/documents.ts';
import type { CellDrawing } from '../../src-main/contract/results.ts';
import { camera } from '../state/camera.svelte.ts';
import { drawing } from '../state/drawing.svelte.ts';
import { pipetteOf, withSite } from '../state/edits/pipette.ts';
import { hover } from '../state/hover.svelte.ts';
import { plan } from '../state/plan.svelte.ts';
import { removeProbe } from '../state/probes.ts';
import { selection } from '../state/selection.svelte.ts';
import { compartmentAt, isWithin, movedSite, siteWords } from '../text/places.ts';
import { pan, turn, zoomAt, type Camera } from './camera.ts';
import { pick, type Picked } from './pick.ts';
import { pickPipette } from './pipette-place.ts';
import type { Scene } from './scene.svelte.ts';

type Drag =
  | {
      readonly kind: 'pan' | 'turn';
      readonly from: Camera;
      readonly x: number;
      readonly y: number;
      readonly hasMoved: boolean;
    }
  | {
      readonly kind: 'pipette';
      readonly letter: PipetteLetter;
      readonly dx: number;
      readonly dy: number;
      readonly hasMoved: boolean;
    };

/** A click may tremble by this much, px. */
const tremble = 3;
/** The pointer need not hit a thin dendrite exactly, px. */
const reach_px = 10;

export class Handling {
  readonly #scene: Scene;
  #drag = $state.raw<Drag | null>(null);
  /** The branch that arrow keys came in from: back outward they take the same way. */
  #cameFrom: number | null = null;
  readonly isDragging = $derived(this.#drag?.hasMoved ?? false);

  constructor(scene: Scene) {
    this.#scene = scene;
  }

  down(event: PointerEvent & { currentTarget: HTMLElement }): void {
    const now = this.#scene.camera;
    if (now === null) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    const { offsetX: x, offsetY: y } = event;
    const letter = event.button === 0 && !event.shiftKey ? pickPipette(this.#scene.pipettes, x, y) : null;
    const place = this.#scene.pipettes.find((p) => p.letter === letter);
    if (letter !== null && place !== undefined) {
      this.#drag = { kind: 'pipette', letter, dx: place.tip.x - x, dy: place.tip.y - y, hasMoved: false };
      selection.selectPipette(letter);
      return;
    }
    const turns = (event.button === 2 || event.shiftKey) && camera.layout === 'As traced';
    this.#drag = { kind: turns ? 'turn' : 'pan', from: now, x, y, hasMoved: false };
  }

  move(event: PointerEvent): void {
    const { offsetX: x, offsetY: y } = event;
    const drag = this.#drag;
    if (drag === null) {
      const picked = this.#pick(x, y, reach_px);
      hover.place =
        picked === null ? null : { site: picked.site, compartment: picked.compartment, x: picked.x, y: picked.y };
      return;
    }
    hover.place = null;
    if (drag.kind === 'pipette') {
      this.#drag = { ...drag, hasMoved: true };
      // Anywhere on the picture: the tip jumps to the nearest branch.
      const picked = this.#pick(x + drag.dx, y + drag.dy, Infinity);
      if (picked !== null) movePipette(drag.letter, picked.site, `drag ${drag.letter}`);
      return;
    }
    const dx = x - drag.x;
    const dy = y - drag.y;
    if (!drag.hasMoved && Math.hypot(dx, dy) < tremble) return;
    this.#drag = { ...drag, hasMoved: true };
    camera.place(drag.kind === 'turn' ? turn(drag.from, dx / 150, dy / 150) : pan(drag.from, dx, dy));
  }

  up(event: PointerEvent): void {
    const drag = this.#drag;
    this.#drag = null;
    if (drag === null) return;
    if (drag.kind === 'pipette') plan.endGesture();
    else if (!drag.hasMoved && event.button === 0) this.#click(event.offsetX, event.offsetY);
  }

  leave(): void {
    if (this.#drag === null) hover.place = null;
  }

  wheel(event: WheelEvent): void {
    const now = this.#scene.camera;
    if (now === null) return;
    event.preventDefault();
    // Lines or pages instead of pixels on some mice.
    const step = event.deltaMode === 0 ? event.deltaY : 30 * event.deltaY;
    camera.place(zoomAt(now, this.#scene.size, event.offsetX, event.offsetY, Math.exp(-step / 400)));
  }

  key(event: KeyboardEvent): void {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    if (this.#moveSelected(event) || this.#look(event)) {
      event.preventDefault();
      event.stopPropagation();
    }
  }

  keyUp(event: KeyboardEvent): void {
    if (event.key.startsWith('Arrow')) plan.endGesture();
  }

  #click(x: number, y: number): void {
    const probe = this.#scene.probes.find((p) => Math.hypot(p.x - x, p.y - y) <= 8);
    if (probe !== undefined) {
      selection.select({ kind: 'probe', name: probe.name });
      return;
    }
    const picked = this.#pick(x, y, reach_px);
    if (picked === null) selection.clear();
    else selection.select({ kind: 'compartment', compartment: picked.compartment, site: picked.site });
  }

  #pick(x: number, y: number, within_px: number): Picked | null {
    const { cell } = this.#scene;
    return cell === null || drawing.drawing === null ? null : pick(cell, x, y, within_px, drawing.drawing.compartments);
  }

  /** Arrow keys along the branch: outward with right and up. Delete takes a probe away. */
  #moveSelected(event: KeyboardEvent): boolean {
    const shown = drawing.drawing;
    const thing = selection.current;
    if (shown === null || !plan.isOpen) return false;
    if (thing.kind === 'probe' && (event.key === 'Delete' || event.key === 'Backspace')) {
      removeProbe(thing.name);
      return true;
    }
    const outward = { ArrowRight: 1, ArrowUp: 1, ArrowLeft: -1, ArrowDown: -1 }[event.key];
    if (outward === undefined) return false;
    const by = outward * (event.shiftKey ? 10 : 1);
    if (thing.kind === 'pipette') {
      const site = pipetteOf(plan.document, thing.letter)?.site;
      if (site !== undefined) movePipette(thing.letter, this.#moved(shown, site, by), `keys ${thing.letter}`);
      return true;
    }
    if (thing.kind === 'compartment') {
      const site = this.#moved(shown, thing.site, by);
      selection.select({ kind: 'compartment', site, compartment: compartmentAt(shown, site) });
      return true;
    }
    return false;
  }

  #moved(shown: CellDrawing, site: Site, by_um: number): Site {
    if ('branch' in site && (this.#cameFrom === null || !isWithin(shown, this.#cameFrom, site.branch))) {
      this.#cameFrom = site.branch;
    }
    return movedSite(shown, site, by_um, this.#cameFrom);
  }

  #look(event: KeyboardEvent): boolean {
    const now = this.#scene.camera;
    if (now === null) return false;
    const { size } = this.#scene;
    const middle = [size.width / 2, size.height / 2] as const;
    const views: Readonly<Record<string, () => Camera>> = {
      '+': () => zoomAt(now, size, ...middle, 1.25),
      '=': () => zoomAt(now, size, ...middle, 1.25),
      '-': () => zoomAt(now, size, ...middle, 0.8),
      '[': () => turn(now, -0.15, 0),
      ']': () => turn(now, 0.15, 0),
      '{': () => turn(now, 0, -0.15),
      '}': () => turn(now, 0, 0.15),
      ArrowLeft: () => pan(now, 30, 0),
      ArrowRight: () => pan(now, -30, 0),
      ArrowUp: () => pan(now, 0, 30),
      ArrowDown: () => pan(now, 0, -30),
    };
    const view = views[event.key];
    const letter = event.key === 'a' ? 'A' : event.key === 'b' ? 'B' : null;
    if (view !== undefined) camera.place(view());
    else if (letter !== null && pipetteOf(plan.document, letter) !== null) selection.selectPipette(letter);
    else return false;
    return true;
  }
}

function movePipette(letter: PipetteLetter, site: Site, gesture: string): void {
  plan.change(`${letter} to ${siteWords(drawing.drawing, site)}`, (p) => withSite(p, letter, site), gesture);
}
