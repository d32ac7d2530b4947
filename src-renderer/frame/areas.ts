// Which component does an area's work, and which one shows the details of the selected thing.
import type { Component } from 'svelte';
import CellArea from '../cell/CellArea.svelte';
import PlaceDetails from '../cell/PlaceDetails.svelte';
import RegionDetails from '../cell/RegionDetails.svelte';
import RigArea from '../rig/RigArea.svelte';
import PipetteDetails from '../rig/PipetteDetails.svelte';
import type { Area } from '../state/area.svelte.ts';
import type { Selection } from '../state/selection.svelte.ts';

// Areas of their own folder: <area>/<Area>Area.svelte and <area>/<Area>Details.svelte, no props.
const others = import.meta.glob<{ default: Component }>(
  ['../{protocol,rehearse,forecast}/*Area.svelte', '../{protocol,rehearse,forecast}/*Details.svelte'],
  { eager: true },
);

function other(area: 'Protocol' | 'Rehearse' | 'Forecast', part: 'Area' | 'Details'): Component | null {
  return others[`../${area.toLowerCase()}/${area}${part}.svelte`]?.default ?? null;
}

export function areaComponent(area: Area): Component | null {
  switch (area) {
    case 'Cell':
      return CellArea;
    case 'Rig':
      return RigArea;
    case 'Protocol':
    case 'Rehearse':
    case 'Forecast':
      return other(area, 'Area');
    default:
      return area satisfies never;
  }
}

/** The details of the selected thing, wherever it was selected; a reading's depend on the area it is looked at in. */
export function detailsComponent(selected: Selection, area: Area): Component | null {
  switch (selected.kind) {
    case 'nothing':
      return null;
    case 'pipette':
      return PipetteDetails;
    case 'region':
      return RegionDetails;
    case 'probe':
    case 'compartment':
      return PlaceDetails;
    case 'lane':
    case 'block':
      return other('Protocol', 'Details');
    case 'reading':
      return other(area === 'Forecast' ? 'Forecast' : 'Protocol', 'Details');
    case 'sweep':
      return other(area === 'Forecast' ? 'Forecast' : 'Rehearse', 'Details');
    default:
      return selected satisfies never;
  }
}
