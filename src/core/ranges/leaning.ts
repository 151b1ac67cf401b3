import { decliningPlainEnd } from "./declining-end.ts";
import type { RangeCase } from "./range-case.ts";
import type { Leaning, LeaningBound, RangeEnd, RangeMethod } from "./result.ts";
import { topKEnd } from "./top-k-end.ts";
import { uniformEnd } from "./uniform-end.ts";

const TAILS = [1, 2];
const FEW_FINDS = [2, 5];

/**
 * The end of a case under each shape of recovery: by the leading method, `uniform`, `declining`, and `top-k` with beta
 * 1 and 2 from the 2, 5 and all outermost finds. Few finds lean least on the shape; where the bounds
 * lie close together the answer hardly depends on it.
 *
 * @param rows the rows that were made of this case, the leading method's first; a method not among them is computed.
 */
export function leaningOf(rangeCase: RangeCase, rows: readonly RangeEnd[]): Leaning {
  const found = (method: RangeMethod) => rows.find((row) => row.method === method);
  const plain = [
    rows[0],
    found("uniform") ?? uniformEnd(rangeCase),
    found("declining") ?? decliningPlainEnd(rangeCase),
  ];
  const distinct = plain.filter((row, i) => plain.findIndex((other) => other.method === row.method) === i);
  const bounds = [...distinct.map((row) => boundOf(rangeCase, row)), ...topKBounds(rangeCase)];
  const { section, taxon, end, range } = rangeCase;
  return {
    section,
    taxon: taxon.taxon,
    end,
    lastM: height(rangeCase, range.lastM),
    bounds,
    ...furthest(rangeCase, bounds),
  };
}

function topKBounds(rangeCase: RangeCase): LeaningBound[] {
  const { length } = rangeCase.levels;
  const counts = [...new Set([...FEW_FINDS, length])].filter((finds) => finds >= 2 && finds <= length);
  return TAILS.flatMap((tail) =>
    counts.map((topFinds) => ({
      ...boundOf(rangeCase, topKEnd({ ...rangeCase, tail, topFinds })),
      tail,
      finds: topFinds,
    })),
  );
}

function boundOf(rangeCase: RangeCase, { method, highM, level, outcome }: RangeEnd): LeaningBound {
  return {
    method,
    ...(highM === undefined ? {} : { boundM: height(rangeCase, highM) }),
    level,
    outcome,
  };
}

function furthest(
  { end }: RangeCase,
  bounds: readonly LeaningBound[],
): Pick<Leaning, "nearestM" | "furthestM"> {
  const heights = bounds.flatMap(({ boundM }) => (boundM === undefined ? [] : [boundM]));
  if (heights.length === 0) return {};
  const [low, high] = [Math.min(...heights), Math.max(...heights)];
  return end === "top" ? { nearestM: low, furthestM: high } : { nearestM: high, furthestM: low };
}

/** A level of a case as the section's own height. */
function height({ end }: RangeCase, levelM: number): number {
  return end === "base" ? 0 - levelM : levelM;
}
