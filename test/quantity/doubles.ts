// Distances between doubles, for checks to the last place.

const float = new Float64Array(1);
const bits = new BigInt64Array(float.buffer);

/** Place of a double in the order of all doubles. */
function ordinal(x: number): bigint {
  float[0] = x;
  const raw = bits[0] ?? 0n;
  return raw < 0n ? -(raw & 0x7fffffffffffffffn) : raw;
}

/** How many doubles lie between two, plus one; 0 for equal ones, NaN if either is none. */
export function stepsApart(a: number, b: number): number {
  if (Number.isNaN(a) || Number.isNaN(b)) return Number.NaN;
  const steps = ordinal(a) - ordinal(b);
  return Number(steps < 0n ? -steps : steps);
}

/** Last bit of the mantissa: 0 for the even one of two neighbours. */
export function lastBit(x: number): number {
  float[0] = x;
  return Number((bits[0] ?? 0n) & 1n);
}
