/** A coordinate as every plate writes it: three decimals, and no negative zero. */
export function round(value: number): number {
  return Math.round(value * 1000) / 1000 + 0;
}
