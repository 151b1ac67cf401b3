import type { LocalTaxon } from "../study/finds-result.ts";
import type { Coordinate, Gap, Limit } from "./coordinate.ts";
import type { RangeEnd, Taper } from "./result.ts";
import type { SampledHorizon } from "./sampled-horizons.ts";

// Upside down: every height h becomes -h, so that a base is estimated as an upper end. Twice is as before.

const flip: Readonly<Record<Limit, Limit>> = { upper: "lower", lower: "upper" };

/** Minus a height; never -0. */
export function mirroredHeight(heightM: number): number {
  return 0 - heightM;
}

export function mirroredTaxon(taxon: LocalTaxon): LocalTaxon {
  const heightsM = taxon.heightsM.map(mirroredHeight).toReversed();
  return {
    ...taxon,
    heightsM,
    samples: taxon.samples.toReversed(),
    ...(taxon.counts === undefined ? {} : { counts: taxon.counts.toReversed() }),
    lastInclusiveM: heightsM[heightsM.length - 1],
  };
}

export function mirroredHorizons(horizons: readonly SampledHorizon[]): readonly SampledHorizon[] {
  return horizons.map((horizon) => ({ ...horizon, heightM: mirroredHeight(horizon.heightM) })).toReversed();
}

function mirroredGap({ baseM, topM }: Gap): Gap {
  return { baseM: mirroredHeight(topM), topM: mirroredHeight(baseM) };
}

/** U of the section upside down: -U(-h). */
export function mirroredCoordinate(coordinate: Coordinate): Coordinate {
  return {
    gaps: coordinate.gaps.map(mirroredGap).toReversed(),
    toEffective: (heightM) => mirroredHeight(coordinate.toEffective(mirroredHeight(heightM))),
    toHeight: (effective, limit) => {
      const heightM = coordinate.toHeight(mirroredHeight(effective), flip[limit]);
      return heightM === undefined ? undefined : mirroredHeight(heightM);
    },
    gapAt: (effective) => {
      const gap = coordinate.gapAt(mirroredHeight(effective));
      return gap === undefined ? undefined : mirroredGap(gap);
    },
  };
}

/** A row estimated upside down, turned back: its upper limit is the lower one again. */
export function turnedBack({ lowM, highM, pointM, ...row }: RangeEnd): RangeEnd {
  return {
    ...row,
    firstM: mirroredHeight(row.lastM),
    lastM: mirroredHeight(row.firstM),
    ...(pointM === undefined ? {} : { pointM: mirroredHeight(pointM) }),
    ...(highM === undefined ? {} : { lowM: mirroredHeight(highM) }),
    ...(lowM === undefined ? {} : { highM: mirroredHeight(lowM) }),
  };
}

/** A taper drawn upside down, turned back: it goes down from the first find. */
export function turnedTaper({ heightsM, endM, ...taper }: Taper): Taper {
  return {
    ...taper,
    heightsM: heightsM.map(mirroredHeight),
    ...(endM === undefined ? {} : { endM: mirroredHeight(endM) }),
  };
}
