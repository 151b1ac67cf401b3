/** State of the generator sfc64 between calls; hot loops keep it in locals (its twin: core/numeric/sfc64.ts). */
export let a: u64 = 0;
export let b: u64 = 0;
export let c: u64 = 0;
export let counter: u64 = 0;

export function keep(a_: u64, b_: u64, c_: u64, counter_: u64): void {
  a = a_;
  b = b_;
  c = c_;
  counter = counter_;
}

/** Draws the next word from the kept state. */
export function next(): u64 {
  const drawn = a + b + counter;
  counter += 1;
  a = b ^ (b >> 11);
  b = c + (c << 3);
  c = rotl<u64>(c, 24) + drawn;
  return drawn;
}

export function discard(count: i32): void {
  for (let drawn = 0; drawn < count; drawn++) next();
}
