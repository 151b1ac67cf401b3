const float = new Float64Array(1);
const words = new Int32Array(float.buffer);
const isLittleEndian = new Uint8Array(new Uint32Array([1]).buffer)[0] === 1;
const HIGH = isLittleEndian ? 1 : 0;
const LOW = 1 - HIGH;

/** Sign, exponent and the upper 20 fraction bits of a double, as a signed 32-bit integer. */
export function highWord(x: number): number {
  float[0] = x;
  return words[HIGH];
}

/** The double with the same lower word and the given upper word. */
export function withHighWord(x: number, high: number): number {
  float[0] = x;
  words[HIGH] = high;
  return float[0];
}

/** The double with its lower 32 bits cleared: a head of 21 significant bits, whose products are exact. */
export function headOf(x: number): number {
  float[0] = x;
  words[LOW] = 0;
  return float[0];
}

function powerOfTwo(exponent: number): number {
  words[HIGH] = (exponent + 1023) << 20;
  words[LOW] = 0;
  return float[0];
}

/** y · 2^k with a single rounding, for |k| ≤ 2000 and y in [½, 2]; the result may be subnormal, zero or infinite. */
export function scaleByPowerOfTwo(y: number, k: number): number {
  if (k >= -1021 && k <= 1023) return y * powerOfTwo(k);
  if (k > 1023) return k > 1025 ? Number.POSITIVE_INFINITY : y * powerOfTwo(k - 2) * 4;
  return k < -1080 ? 0 : y * powerOfTwo(k + 1000) * powerOfTwo(-1000);
}
