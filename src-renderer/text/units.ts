// The units a field understands. Powers of ten stay whole numbers, so that converting never adds rounding noise.

export interface UnitEntry {
  readonly symbol: string;
  readonly kind: string;
  /** One of it is 10^power of the kind's base unit, times `factor` (60 for minutes; 1 where absent). */
  readonly power: number;
  readonly factor?: number;
}

const prefixes: Readonly<Record<string, number>> = { G: 9, M: 6, k: 3, '': 0, m: -3, µ: -6, n: -9, p: -12, f: -15 };

function family(kind: string, base: string, used: string): readonly UnitEntry[] {
  return [...used.split(' ')].map((p) => {
    const prefix = p === '-' ? '' : p;
    return { symbol: prefix + base, kind, power: prefixes[prefix] ?? 0 };
  });
}

export const units: readonly UnitEntry[] = [
  ...family('voltage', 'V', '- m µ'),
  ...family('current', 'A', '- m µ n p f'),
  ...family('resistance', 'Ω', '- k M G'),
  ...family('capacitance', 'F', '- µ n p f'),
  ...family('conductance', 'S', '- m µ n p'),
  ...family('charge', 'C', '- µ n p f'),
  ...family('time', 's', '- m µ n'),
  { symbol: 'min', kind: 'time', power: 0, factor: 60 },
  ...family('length', 'm', '- m µ n'),
  ...family('frequency', 'Hz', '- k M'),
  { symbol: '°C', kind: 'temperature', power: 0 },
  { symbol: '%', kind: 'share', power: 0 },
  { symbol: 'µF/cm²', kind: 'specific capacitance', power: 0 },
  { symbol: 'Ω·cm', kind: 'axial resistivity', power: 0 },
  { symbol: 'Ω·m', kind: 'axial resistivity', power: 2 },
  { symbol: 'mS/cm²', kind: 'conductance density', power: -3 },
  { symbol: 'S/cm²', kind: 'conductance density', power: 0 },
  { symbol: 'µS/cm²', kind: 'conductance density', power: -6 },
  // 1 pS/µm² = 1e-12 S / 1e-8 cm².
  { symbol: 'pS/µm²', kind: 'conductance density', power: -4 },
  { symbol: 'µm²', kind: 'area', power: 0 },
  { symbol: 'mV·ms', kind: 'voltage integral', power: 0 },
];

/** As people type them: one spelling for each sign. Case is kept, for M and m differ. */
export function plainUnit(text: string): string {
  return text
    .trim()
    .replaceAll('\u03bc', 'µ')
    .replaceAll('\u2126', 'Ω')
    .replace(/ohms?(?![a-z])/i, 'Ω')
    .replace(/^u(?=[A-Za-zΩ])/, 'µ')
    .replace(/\/um(?:2|\^2|²)$/, '/µm²')
    .replace(/(?:\^2|2)$/, '²')
    .replace(/^(?:deg ?C|°c|C)$/, '°C')
    .replace(/\s*[*·.]\s*/g, '·')
    .replace(/^per ?cent$/i, '%')
    .replace(/^sec$/, 's');
}

/** The unit of that spelling, or null. */
export function unitOf(text: string): UnitEntry | null {
  const plain = plainUnit(text);
  return units.find((unit) => unit.symbol === plain) ?? null;
}
