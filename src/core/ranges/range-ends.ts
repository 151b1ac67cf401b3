import type { Caution, Progress } from "../basis.ts";
import type { Study } from "../study/model.ts";
import { coordinateBasis } from "./basis.ts";
import { type RangesInput, sectionCases } from "./cases.ts";
import { rangeCautions } from "./cautions.ts";
import { leaningOf } from "./leaning.ts";
import { rangeMethods } from "./methods.ts";
import { turnedBack } from "./mirrored.ts";
import { note, type RangeCase } from "./range-case.ts";
import type { Leaning, RangeEnd, RangeMethod, Ranges, Taper } from "./result.ts";
import { taper } from "./taper.ts";
import { uniformEnd } from "./uniform-end.ts";

/**
 * The true ends of every taxon in every section, a row for each method of `ranges.methods` at the top, at the base and,
 * where the method has one, a joint interval of both; a taper each by the leading method; and how much each end leans on
 * the shape of recovery. Where the names read inclusively reach higher, `uniform` is given for them too.
 */
export function estimateRanges(study: Study, input: RangesInput, progress?: Progress): Ranges {
  const { methods } = study.settings.ranges;
  const ends: RangeEnd[] = [];
  const tapers: Taper[] = [];
  const leanings: Leaning[] = [];
  const cautions: Caution[] = [];
  study.sections.forEach((section, index) => {
    progress?.(`ranges: ${section.name}`, index, study.sections.length);
    const both = sectionCases(section, study, input);
    const cases = both.map(({ top }) => top);
    const rows = cases.map((rangeCase) => rowsOf(rangeCase, methods));
    const baseRows = both.map(({ base }) => rowsOf(base, methods));
    ends.push(
      ...both.flatMap((ofTaxon, i) => [
        ...rows[i],
        ...inclusiveEnds(ofTaxon.top),
        ...baseRows[i].map(turnedBack),
        ...jointEnds(ofTaxon.top, methods),
      ]),
    );
    leanings.push(
      ...both.flatMap(({ top, base }, i) => [leaningOf(top, rows[i]), leaningOf(base, baseRows[i])]),
    );
    tapers.push(...cases.flatMap((rangeCase) => taperOf(rangeCase, methods[0])));
    cautions.push(...rangeCautions({ section, study, markers: input.markers, cases, rows: rows.flat() }));
  });
  return {
    ends,
    tapers,
    leanings,
    cautions,
    basis: [coordinateBasis, ...methods.map((m) => rangeMethods[m].basis)],
  };
}

function rowsOf(rangeCase: RangeCase, methods: readonly RangeMethod[]): RangeEnd[] {
  return methods.map((method) => rangeMethods[method].end(rangeCase));
}

/** The joint intervals of base and top, of the methods that have one. */
function jointEnds(top: RangeCase, methods: readonly RangeMethod[]): RangeEnd[] {
  return methods.flatMap((method) => rangeMethods[method].both?.(top) ?? []);
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
