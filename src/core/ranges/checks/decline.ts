import { type Centroid, centroid, rescaledInterior } from "./centroid.ts";

/** A pooled p for decline below this demotes the methods that assume constant recovery. */
export const DECLINE_GATE = 0.1;

/**
 * Does recovery decline upward, all finds between the first and the last of each taxon taken together? The centroid where
 * its p is under the gate of 0.1; undefined where it is not, or no such find exists.
 *
 * @param levels each taxon's finds in the coordinate that recovery should be constant in, from below upward.
 */
export function declineUpward(levels: readonly (readonly number[])[]): Centroid | undefined {
  const test = centroid(levels.flatMap(rescaledInterior));
  return test !== undefined && test.p < DECLINE_GATE ? test : undefined;
}
