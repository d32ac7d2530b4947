// Document fields in a reader's words: "axialResistivity_Ohm_cm" is an axial resistivity in Ω·cm.

export type FieldPath = readonly (string | number)[];

const unitOfEnding: Readonly<Record<string, string>> = {
  mV: 'mV',
  pA: 'pA',
  ms: 'ms',
  us: 'µs',
  um: 'µm',
  um2: 'µm²',
  nS: 'nS',
  pF: 'pF',
  Hz: 'Hz',
  C: '°C',
  percent: '%',
  MOhm: 'MΩ',
  Ohm_cm: 'Ω·cm',
  uF_cm2: 'µF/cm²',
  mS_cm2: 'mS/cm²',
};

/** `cell.makeUp[0].leak.reversal_mV`: names by dots, positions in brackets; the whole document is "". */
export function pathText(path: FieldPath): string {
  return path.map((part, at) => (typeof part === 'number' ? `[${part}]` : at === 0 ? part : `.${part}`)).join('');
}

/** What the last name of a path is called: "access resistance". An item of a list is "item 3 of pipettes", from 1. */
export function fieldThing(path: FieldPath): string {
  const last = path.at(-1);
  if (last === undefined) return 'document';
  if (typeof last === 'number') return `item ${last + 1} of ${fieldThing(path.slice(0, -1))}`;
  const bare = splitUnit(last).name;
  return bare
    .replaceAll(/([a-z])([A-Z])/g, '$1 $2')
    .replaceAll('_', ' ')
    .toLowerCase();
}

/** A value as it stands in the document, with the field's unit; long ones cut short. */
export function fieldValue(value: unknown, path: FieldPath): string {
  if (value === undefined) return 'missing';
  if (typeof value === 'number') {
    const field = path.findLast((part) => typeof part === 'string');
    const unit = field === undefined ? '' : splitUnit(field).unit;
    return unit === '' ? String(value) : `${value} ${unit}`;
  }
  if (Array.isArray(value)) return `a list of ${value.length}`;
  if (typeof value === 'object' && value !== null) return 'a group of fields';
  const text = JSON.stringify(value);
  return text.length > 60 ? `${text.slice(0, 57)}…` : text;
}

function splitUnit(field: string): { name: string; unit: string } {
  const cut = field.indexOf('_');
  const unit = cut > 0 ? unitOfEnding[field.slice(cut + 1)] : undefined;
  return unit === undefined ? { name: field, unit: '' } : { name: field.slice(0, cut), unit };
}
