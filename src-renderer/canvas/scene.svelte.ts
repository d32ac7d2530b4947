// Everything on the cell canvas, derived from the state: the projected cell, its colours, pipettes and probes.
import type { PipetteDocument } from '../../src-main/contract/documents.ts';
import { camera } from '../state/camera.svelte.ts';
import { colouring } from '../state/colouring.svelte.ts';
import { drawing } from '../state/drawing.svelte.ts';
import { plan } from '../state/plan.svelte.ts';
import { selection } from '../state/selection.svelte.ts';
import { theme } from '../state/theme.svelte.ts';
import { given, signedFigure } from '../text/quantity.ts';
import { compartmentAt, siteWords } from '../text/places.ts';
import { fit, type Camera, type Size } from './camera.ts';
import { cellModel, extent } from './cell-model.ts';
import { readColours } from './colours.ts';
import { placeOf } from './pick.ts';
import { pipettePlace, type PipettePlace } from './pipette-place.ts';
import { paintBand, paintCell } from './painters/cell.ts';
import { paintPipette } from './painters/pipette.ts';
import { paintProbe } from './painters/probe.ts';
import { projected } from './projected.ts';

const font = '"Fira Sans", sans-serif';
/** Room around a fitted cell: for labels at the sides, the title above, legend and switch below. */
const fitMargin = { x: 36, top: 56, bottom: 104 };

export class Scene {
  size = $state.raw<Size>({ width: 0, height: 0 });

  readonly model = $derived(drawing.drawing === null ? null : cellModel(drawing.drawing, camera.layout === 'Flat'));
  readonly #fitted: Camera | null = $derived(
    this.model === null || this.size.width === 0 ? null : fit(extent(this.model), this.size, camera.angles, fitMargin),
  );
  readonly camera: Camera | null = $derived(camera.placed ?? this.#fitted);
  readonly cell = $derived(
    this.model === null || this.camera === null ? null : projected(this.model, this.flatten(this.camera), this.size),
  );
  readonly pipettes: readonly PipettePlace[] = $derived(
    plan.isOpen ? plan.document.rig.pipettes.flatMap((p) => this.#pipettePlace(p)) : [],
  );
  readonly probes = $derived(
    plan.isOpen
      ? plan.document.probes.flatMap((probe) => {
          const place = this.#place(probe.site);
          return place === null ? [] : [{ ...place, name: probe.name }];
        })
      : [],
  );
  readonly colours = $derived.by(() => {
    // The theme is put in force here too: the painter may come before the window's own effect.
    document.documentElement.dataset['theme'] = theme.shown;
    return readColours(document.documentElement);
  });

  /** What the painter needs; read it to be repainted. */
  get content() {
    return {
      cell: this.cell,
      colours: this.colours,
      colouring: colouring.shown,
      pipettes: this.pipettes,
      probes: this.probes,
      selected: selection.current,
      labels: plan.isOpen ? plan.document.rig.pipettes.map((p) => this.#label(p)) : [],
      table: drawing.drawing?.compartments ?? null,
    };
  }

  /** The flat layout is not turned. */
  flatten(of: Camera): Camera {
    return camera.layout === 'Flat' ? { ...of, yaw: 0, pitch: 0 } : of;
  }

  #place(site: PipetteDocument['site']): { readonly x: number; readonly y: number } | null {
    if (this.cell === null || drawing.drawing === null) return null;
    return placeOf(this.cell, site, drawing.drawing.compartments);
  }

  #pipettePlace(pipette: PipetteDocument): PipettePlace[] {
    const tip = this.#place(pipette.site);
    return tip === null ? [] : [pipettePlace(pipette.letter, { x: tip.x, y: tip.y }, this.size)];
  }

  #label(pipette: PipetteDocument): { readonly title: string; readonly note: string } {
    const title = siteWords(drawing.drawing, pipette.site);
    const shown = colouring.shown;
    if (shown === null || drawing.drawing === null) {
      return { title, note: `access ${given(pipette.accessResistance_MOhm, 'MΩ')}` };
    }
    const value = shown.values[compartmentAt(drawing.drawing, pipette.site)] ?? NaN;
    const words = signedFigure(value, shown.unit);
    return { title, note: shown.scale === 'signed' ? words : words.replace('+', '') };
  }
}

/** Paints what the scene holds. */
export function paintScene(context: CanvasRenderingContext2D, size: Size, scene: Scene['content']): void {
  const { cell, colours, selected, table } = scene;
  if (cell === null) return;
  if (selected.kind === 'region' && table !== null) {
    const region = table.regionNames.indexOf(selected.region);
    paintBand(context, cell, colours.select, (k) => table.regionIndex[k] === region);
  }
  if (selected.kind === 'compartment') {
    paintBand(context, cell, colours.select, (k) => k === selected.compartment);
  }
  const shown = scene.colouring;
  paintCell(context, {
    cell,
    values: shown?.values ?? null,
    low: shown?.low ?? 0,
    high: shown?.high ?? 1,
    steps: shown?.scale === 'signed' ? colours.signed : colours.magnitude,
    plain: colours.ink2,
  });
  const common = { ink: colours.ink, ink2: colours.ink2, canvas: colours.canvas, accent: colours.accent, font };
  for (const probe of scene.probes) {
    paintProbe(context, { ...common, ...probe, isSelected: selected.kind === 'probe' && selected.name === probe.name });
  }
  scene.pipettes.forEach((place, i) => {
    const isA = place.letter === 'A';
    paintPipette(
      context,
      {
        ...common,
        place,
        stroke: isA ? colours.a : colours.b,
        fill: isA ? colours.aTint : colours.bTint,
        isSelected: selected.kind === 'pipette' && selected.letter === place.letter,
        title: scene.labels[i]?.title ?? '',
        note: scene.labels[i]?.note ?? '',
      },
      size,
    );
  });
}
