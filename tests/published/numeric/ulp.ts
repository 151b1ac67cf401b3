const view = new DataView(new ArrayBuffer(8));

/** Position of a double among all doubles in order, so that neighbours differ by 1. */
function rank(x: number): bigint {
  view.setFloat64(0, x);
  const bits = view.getBigInt64(0);
  return bits < 0n ? -(bits & 0x7fffffffffffffffn) : bits;
}

/** How many doubles apart two doubles lie; 0 and −0 count as one. */
export function ulpsBetween(a: number, b: number): number {
  const difference = rank(a) - rank(b);
  return Number(difference < 0n ? -difference : difference);
}

/** |a − b| / |b|, 0 where both are the same. */
export function relativeError(a: number, b: number): number {
  return a === b ? 0 : Math.abs(a - b) / Math.abs(b);
}
