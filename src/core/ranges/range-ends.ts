import type { Caution, Progress } from "../basis.ts";
import type { Study } from "../study/model.ts";
import { coordinateBasis } from "./basis.ts";
import { type RangesInput, sectionCases, type TaxonCases } from "./cases.ts";
import { rangeCautions } from "./cautions.ts";
import { rangeMethods } from "./methods.ts";
import { turnedBack } from "./mirrored.ts";
import { note, type RangeCase } from "./range-case.ts";
import type { RangeEnd, RangeMethod, Ranges, Taper } from "./result.ts";
import { taper } from "./taper.ts";
import { uniformEnd } from "./uniform-end.ts";

/**
 * The true ends of every taxon in every section, a row for each method of `ranges.methods` at the top, at the base and,
 * where the method has one, a joint interval of both; and a taper each by the leading method. Where the names read
 * inclusively reach higher, `uniform` is given for them too.
 */
export function estimateRanges(study: Study, input: RangesInput, progress?: Progress): Ranges {
  const { methods } = study.settings.ranges;
  const ends: RangeEnd[] = [];
  const tapers: Taper[] = [];
  const cautions: Caution[] = [];
  study.sections.forEach((section, index) => {
    progress?.(`ranges: ${section.name}`, index, study.sections.length);
    const both = sectionCases(section, study, input);
    const cases = both.map(({ top }) => top);
    const rows = cases.map((rangeCase) => methods.map((method) => rangeMethods[method].end(rangeCase)));
    ends.push(
      ...rows.flatMap((ofTaxon, i) => [
        ...ofTaxon,
        ...inclusiveEnds(cases[i]),
        ...baseEnds(both[i], methods),
      ]),
    );
    tapers.push(...cases.flatMap((rangeCase) => taperOf(rangeCase, methods[0])));
    cautions.push(...rangeCautions({ section, study, markers: input.markers, cases, rows: rows.flat() }));
  });
  return { ends, tapers, cautions, basis: [coordinateBasis, ...methods.map((m) => rangeMethods[m].basis)] };
}

/** The base by every method, then the joint intervals of those that have one. */
function baseEnds({ top, base }: TaxonCases, methods: readonly RangeMethod[]): RangeEnd[] {
  return [
    ...methods.map((method) => turnedBack(rangeMethods[method].end(base))),
    ...methods.flatMap((method) => rangeMethods[method].both?.(top) ?? []),
  ];
}

/** The last find under inclusive names counts as one more horizon: the least number that it can be. */
function inclusiveEnds(rangeCase: RangeCase): RangeEnd[] {
  const { taxon, constant, identification } = rangeCase;
  const { range, levels, coordinate } = constant;
  const lastM = taxon.lastInclusiveM;
  if (identification === "inclusive" || !(lastM > range.lastM)) return [];
  const last = coordinate.toEffective(lastM);
  const inclusive = {
    ...constant,
    range: { ...range, lastM, last, horizons: range.horizons + 1, exponent: range.exponent + 1 },
    levels: levels.length === 0 ? [] : [...levels, last],
  };
  const row = uniformEnd({ ...rangeCase, constant: inclusive, identification: "inclusive" });
  return [{ ...row, note: note("strict horizons and the inclusive last find", row.note) }];
}

/** The taper ends where the interval closes inside the section. */
function taperOf(rangeCase: RangeCase, leading: RangeMethod): Taper[] {
  const endM = (method: RangeMethod) => {
    const row = rangeMethods[method].end(rangeCase);
    return row.outcome === "closed" || row.outcome === "in-hiatus" ? row.highM : undefined;
  };
  const drawn = taper(rangeCase, leading, endM);
  return drawn === undefined ? [] : [drawn];
}
