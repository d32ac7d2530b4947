// Which component does an area's work, and which one shows the details of the selected thing.
import type { Component } from 'svelte';
import CellArea from '../cell/CellArea.svelte';
import PlaceDetails from '../cell/PlaceDetails.svelte';
import RegionDetails from '../cell/RegionDetails.svelte';
import RigArea from '../rig/RigArea.svelte';
import PipetteDetails from '../rig/PipetteDetails.svelte';
import ForecastArea from '../forecast/ForecastArea.svelte';
import ForecastDetails from '../forecast/ForecastDetails.svelte';
import ProtocolArea from '../protocol/ProtocolArea.svelte';
import ProtocolDetails from '../protocol/ProtocolDetails.svelte';
import RehearseArea from '../rehearse/RehearseArea.svelte';
import RehearseDetails from '../rehearse/RehearseDetails.svelte';
import type { Area } from '../state/areas.ts';
import type { Selection } from '../state/selection.svelte.ts';

export function areaComponent(area: Area): Component {
  switch (area) {
    case 'Cell':
      return CellArea;
    case 'Rig':
      return RigArea;
    case 'Protocol':
      return ProtocolArea;
    case 'Rehearse':
      return RehearseArea;
    case 'Forecast':
      return ForecastArea;
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
      return ProtocolDetails;
    case 'reading':
      return area === 'Forecast' ? ForecastDetails : ProtocolDetails;
    case 'sweep':
      return area === 'Forecast' ? ForecastDetails : RehearseDetails;
    default:
      return selected satisfies never;
  }
}
