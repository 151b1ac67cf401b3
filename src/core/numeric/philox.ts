/** Four 32-bit words, each an unsigned integer. */
export type FourWords = readonly [number, number, number, number];
export type TwoWords = readonly [number, number];

const MULTIPLIER_0 = 0xd2511f53;
const MULTIPLIER_1 = 0xcd9e8d57;
const KEY_STEP_0 = 0x9e3779b9;
const KEY_STEP_1 = 0xbb67ae85;
const ROUNDS = 10;

/** The upper 32 bits of a product of two 32-bit unsigned integers. */
function highProduct(a: number, b: number): number {
  const aLow = a & 0xffff;
  const aHigh = a >>> 16;
  const bLow = b & 0xffff;
  const bHigh = b >>> 16;
  const middle = aHigh * bLow + ((aLow * bLow) >>> 16);
  const cross = aLow * bHigh + (middle & 0xffff);
  return (aHigh * bHigh + Math.floor(middle / 65536) + Math.floor(cross / 65536)) >>> 0;
}

/**
 * Philox4x32-10: four random 32-bit words as a pure function of a counter and a key.
 * Round: (h0, l0) = M0·c0, (h1, l1) = M1·c2; c = (h1 ⊕ c1 ⊕ k0, l1, h0 ⊕ c3 ⊕ k1, l0); the key steps by Weyl constants.
 * Source: Salmon, Moraes, Dror & Shaw 2011, Proc. SC11, doi 10.1145/2063384.2063405.
 */
export function philox4x32(counter: FourWords, key: TwoWords): FourWords {
  let [c0, c1, c2, c3] = counter;
  let [k0, k1] = key;
  for (let round = 0; round < ROUNDS; round++) {
    const high0 = highProduct(MULTIPLIER_0, c0);
    const low0 = Math.imul(MULTIPLIER_0, c0);
    const high1 = highProduct(MULTIPLIER_1, c2);
    const low1 = Math.imul(MULTIPLIER_1, c2);
    c0 = (high1 ^ c1 ^ k0) >>> 0;
    c1 = low1 >>> 0;
    c2 = (high0 ^ c3 ^ k1) >>> 0;
    c3 = low0 >>> 0;
    k0 = (k0 + KEY_STEP_0) >>> 0;
    k1 = (k1 + KEY_STEP_1) >>> 0;
  }
  return [c0, c1, c2, c3];
}
