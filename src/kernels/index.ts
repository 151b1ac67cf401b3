import { a, b, c, counter, keep } from "./sfc64";
import { beyondRectangle, LAYERS } from "./ziggurat";

export { discard, keep as seed } from "./sfc64";

/** Fills `count` doubles at `out` with standard exponentials. */
export function exponentials(out: usize, count: i32): void {
  let sa = a;
  let sb = b;
  let sc = c;
  let sn = counter;
  const end = out + ((<usize>count) << 3);
  for (let place = out; place < end; place += 8) {
    const word = sa + sb + sn;
    sn += 1;
    sa = sb ^ (sb >> 11);
    sb = sc + (sc << 3);
    sc = rotl<u64>(sc, 24) + word;
    const layer = (<usize>(word & 255)) << 4;
    const part = word >> 11;
    let x = <f64>(<i64>part) * load<f64>(LAYERS + layer, 8);
    if (part >= load<u64>(LAYERS + layer)) {
      keep(sa, sb, sc, sn);
      x = beyondRectangle(layer >> 4, x);
      sa = a;
      sb = b;
      sc = c;
      sn = counter;
    }
    store<f64>(place, x);
  }
  keep(sa, sb, sc, sn);
}

/**
 * T = sum E - total min(E / m) for each replicate, where E are standard exponentials, one a taxon: half the statistic
 * of the common-end test when all taxa end together. `inverse` holds 1 / m for `taxa` taxa, `total` is the sum of m.
 */
export function spreads(inverse: usize, taxa: i32, total: f64, out: usize, replicates: i32): void {
  let sa = a;
  let sb = b;
  let sc = c;
  let sn = counter;
  const last = inverse + ((<usize>taxa) << 3);
  const end = out + ((<usize>replicates) << 3);
  for (let place = out; place < end; place += 8) {
    let sum: f64 = 0.0;
    let least = f64x2.splat(Infinity);
    for (let taxon = inverse; taxon < last; taxon += 8) {
      const word = sa + sb + sn;
      sn += 1;
      sa = sb ^ (sb >> 11);
      sb = sc + (sc << 3);
      sc = rotl<u64>(sc, 24) + word;
      const layer = (<usize>(word & 255)) << 4;
      const part = word >> 11;
      let x = <f64>(<i64>part) * load<f64>(LAYERS + layer, 8);
      if (part >= load<u64>(LAYERS + layer)) {
        keep(sa, sb, sc, sn);
        x = beyondRectangle(layer >> 4, x);
        sa = a;
        sb = b;
        sc = c;
        sn = counter;
      }
      sum += x;
      least = f64x2.pmin(least, f64x2.splat(x * load<f64>(taxon)));
    }
    store<f64>(place, sum - f64x2.extract_lane(least, 0) * total);
  }
  keep(sa, sb, sc, sn);
}
