import { type ScaleLinear, scaleLinear } from "d3";

/** From metres of stratigraphic height to points down the plate; piecewise linear where a lens magnifies. */
export type HeightScale = ScaleLinear<number, number>;

export interface HeightExtent {
  readonly bottomM: number;
  readonly topM: number;
  /** Points from the plate's upper edge. */
  readonly top: number;
  readonly bottom: number;
}

/** A band drawn magnified inside the whole section. */
export interface Lens {
  readonly baseM: number;
  readonly topM: number;
  readonly magnification: number;
}

export function heightScale({ bottomM, topM, top, bottom }: HeightExtent, lens?: Lens): HeightScale {
  if (!(topM > bottomM))
    throw new RangeError(`heightScale: expected a top above ${bottomM} m, got ${topM} m`);
  if (lens === undefined) return scaleLinear([bottomM, topM], [bottom, top]);
  const { baseM, topM: lensTopM, magnification } = lens;
  const lengths = [baseM - bottomM, (lensTopM - baseM) * magnification, topM - lensTopM];
  const [below = 0, within = 0, above = 0] = lengths;
  const pointsPerMetre = (bottom - top) / (below + within + above);
  const range = [bottom, bottom - below * pointsPerMetre, top + above * pointsPerMetre, top];
  return scaleLinear([bottomM, baseM, lensTopM, topM], range);
}

export interface Span {
  readonly top: number;
  readonly bottom: number;
}

/** Upper and lower end of the scale on the plate. */
export function spanOf(y: HeightScale): Span {
  const range = y.range();
  return { top: Math.min(...range), bottom: Math.max(...range) };
}

/** Lowest and highest height of the scale. */
export function extentOf(y: HeightScale): readonly [bottomM: number, topM: number] {
  const domain = y.domain();
  return [Math.min(...domain), Math.max(...domain)];
}

/** Whether a height is inside the frame; what lies outside is not drawn. */
export function isInFrame(y: HeightScale, heightM: number): boolean {
  const [bottomM, topM] = extentOf(y);
  return heightM >= bottomM && heightM <= topM;
}

/** The part of base to top that is inside the frame, on the plate; undefined where none is. */
export function clippedSpan(y: HeightScale, baseM: number, topM: number): Span | undefined {
  const [lowest, highest] = extentOf(y);
  if (topM < lowest || baseM > highest) return undefined;
  return { top: y(Math.min(topM, highest)), bottom: y(Math.max(baseM, lowest)) };
}
