/** A 64-bit word as two unsigned 32-bit halves. */
export interface Word64 {
  readonly high: number;
  readonly low: number;
}

export interface Sfc64State {
  readonly a: Word64;
  readonly b: Word64;
  readonly c: Word64;
  readonly counter: Word64;
}

const TWO_MINUS_32 = 2 ** -32;
const TWO_MINUS_52 = 2 ** -52;
const TWO_MINUS_53 = 2 ** -53;

/**
 * The generator sfc64 (small fast counting): 256 bits of state, a period of at least 2^64.
 * One step: t = a + b + counter; counter += 1; a = b ⊕ (b ≫ 11); b = c + (c ≪ 3); c = rotate(c, 24) + t; draws t.
 * Source: Doty-Humphrey, PractRand 0.94 (public domain), sfc64; the same words as SFC64 in numpy 2.4.6.
 */
export class Sfc64 {
  /** The upper and lower half of the word drawn last. */
  high = 0;
  low = 0;
  private aHigh: number;
  private aLow: number;
  private bHigh: number;
  private bLow: number;
  private cHigh: number;
  private cLow: number;
  private counterHigh: number;
  private counterLow: number;

  constructor({ a, b, c, counter }: Sfc64State) {
    this.aHigh = a.high | 0;
    this.aLow = a.low | 0;
    this.bHigh = b.high | 0;
    this.bLow = b.low | 0;
    this.cHigh = c.high | 0;
    this.cLow = c.low | 0;
    this.counterHigh = counter.high | 0;
    this.counterLow = counter.low | 0;
  }

  /** Draws the next 64-bit word into `high` and `low`. */
  step(): void {
    const { bHigh, bLow, cHigh, cLow } = this;
    const sumLow = (this.aLow >>> 0) + (bLow >>> 0) + (this.counterLow >>> 0);
    const drawnLow = sumLow | 0;
    const drawnHigh = (this.aHigh + bHigh + this.counterHigh + Math.floor(sumLow * TWO_MINUS_32)) | 0;
    this.counterLow = (this.counterLow + 1) | 0;
    if (this.counterLow === 0) this.counterHigh = (this.counterHigh + 1) | 0;
    this.aLow = bLow ^ ((bLow >>> 11) | (bHigh << 21));
    this.aHigh = bHigh ^ (bHigh >>> 11);
    const multipliedLow = (cLow >>> 0) + ((cLow << 3) >>> 0);
    this.bLow = multipliedLow | 0;
    this.bHigh = (cHigh + ((cHigh << 3) | (cLow >>> 29)) + Math.floor(multipliedLow * TWO_MINUS_32)) | 0;
    const rotatedLow = (((cLow << 24) | (cHigh >>> 8)) >>> 0) + (drawnLow >>> 0);
    this.cLow = rotatedLow | 0;
    this.cHigh = (((cHigh << 24) | (cLow >>> 8)) + drawnHigh + Math.floor(rotatedLow * TWO_MINUS_32)) | 0;
    this.high = drawnHigh >>> 0;
    this.low = drawnLow >>> 0;
  }

  /** Uniform in [0, 1): the upper 53 bits over 2^53. */
  nextDouble(): number {
    this.step();
    return (this.high * 2097152 + (this.low >>> 11)) * TWO_MINUS_53;
  }

  /** Uniform in (0, 1): the centre of one of 2^52 cells, so that neither 0 nor 1 is ever drawn. */
  nextOpenDouble(): number {
    this.step();
    return (this.high * 1048576 + (this.low >>> 12) + 0.5) * TWO_MINUS_52;
  }
}

/** A generator at the given state. Seeded states want 12 draws dropped first, see {@link discard}. */
export function sfc64(state: Sfc64State): Sfc64 {
  return new Sfc64(state);
}

/** Draws and drops words. */
export function discard(generator: Sfc64, count: number): void {
  for (let drawn = 0; drawn < count; drawn++) generator.step();
}
