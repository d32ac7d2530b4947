// Parts of a circuit as SVG paths. Pure.

/** A resistor from (x, y) along `length` px to the right: flat leads, six teeth. */
export function resistor(x: number, y: number, length: number): string {
  const teeth = Math.max(3, Math.round(length / 12));
  const step = length / teeth;
  let path = `M${x} ${y}`;
  for (let i = 0; i < teeth; i++) {
    path += `l${step / 4} ${i === 0 ? -6 : -6}l${step / 2} 12l${step / 4} -6`;
  }
  return path;
}

/** A resistor downward. */
export function uprightResistor(x: number, y: number, length: number): string {
  const teeth = Math.max(3, Math.round(length / 12));
  const step = length / teeth;
  let path = `M${x} ${y}`;
  for (let i = 0; i < teeth; i++) path += `l-6 ${step / 4}l12 ${step / 2}l-6 ${step / 4}`;
  return path;
}

/** A capacitor on a line that goes down from (x, y), and earth below it. */
export function capacitorToEarth(x: number, y: number, length: number): string {
  const middle = y + length / 2;
  const plates = `M${x} ${y}V${middle - 3}M${x - 11} ${middle - 3}h22M${x - 11} ${middle + 3}h22M${x} ${middle + 3}V${y + length}`;
  return plates + earth(x, y + length);
}

export function earth(x: number, y: number): string {
  return `M${x - 9} ${y}h18M${x - 6} ${y + 4}h12M${x - 3} ${y + 8}h6`;
}
