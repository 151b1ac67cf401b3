import type { Progress } from "../basis.ts";
import type { Section, Study } from "../study/model.ts";
import { coordinateBasis } from "./basis.ts";
import { type RangesInput, sectionCases } from "./cases.ts";
import { rangeCautions } from "./cautions.ts";
import { caseUnder, type Leading, leadingMethods, marked } from "./leading.ts";
import { leaningOf } from "./leaning.ts";
import { rangeMethods } from "./methods.ts";
import { turnedBack, turnedTaper } from "./mirrored.ts";
import { note, type RangeCase } from "./range-case.ts";
import type { RangeEnd, RangeMethod, Ranges } from "./result.ts";
import { taper } from "./taper.ts";
import { uniformEnd } from "./uniform-end.ts";

/**
 * The true ends of every taxon in every section, a row for each method of `ranges.methods` at the top, at the base and,
 * where the method has one, a joint interval of both; a taper beyond each end by the leading method; and how much each end leans on
 * the shape of recovery. Where the names read inclusively reach higher, `uniform` is given for them too.
 */
export function estimateRanges(study: Study, input: RangesInput, progress?: Progress): Ranges {
  const { methods } = study.settings.ranges;
  const bySection = study.sections.map((section, index) => {
    progress?.(`ranges: ${section.name}`, index, study.sections.length);
    return estimateSection(section, study, input);
  });
  return {
    ends: bySection.flatMap(({ ends }) => ends),
    tapers: bySection.flatMap(({ tapers }) => tapers),
    baseTapers: bySection.flatMap(({ baseTapers }) => baseTapers),
    leanings: bySection.flatMap(({ leanings }) => leanings),
    cautions: bySection.flatMap(({ cautions }) => cautions),
    basis: [coordinateBasis, ...methods.map((m) => rangeMethods[m].basis)],
  };
}

function estimateSection(section: Section, study: Study, input: RangesInput): Omit<Ranges, "basis"> {
  const { methods } = study.settings.ranges;
  const taxa = sectionCases(section, study, input);
  const candidates = taxa.filter(({ isCandidate }) => isCandidate);
  const atTop = leadingMethods(
    candidates.map(({ top }) => top),
    methods,
  );
  const atBase = leadingMethods(
    candidates.map(({ base }) => base),
    methods,
  );
  const cases = taxa.map(({ top, base }) => ({ top: caseUnder(atTop, top), base: caseUnder(atBase, base) }));
  const rows = cases.map(({ top, base }) => ({ top: rowsOf(top, atTop), base: rowsOf(base, atBase) }));
  return {
    ends: cases.flatMap(({ top }, i) => [
      ...rows[i].top,
      ...inclusiveEnds(top),
      ...rows[i].base.map(turnedBack),
      ...jointEnds(top, methods),
    ]),
    leanings: cases.flatMap(({ top, base }, i) => [
      leaningOf(top, rows[i].top),
      leaningOf(base, rows[i].base),
    ]),
    tapers: cases.flatMap(({ top }) => taper(top, atTop.methods[0]) ?? []),
    baseTapers: cases.flatMap(({ base }) => taper(base, atBase.methods[0]) ?? []).map(turnedTaper),
    cautions: rangeCautions({
      section,
      study,
      markers: input.markers,
      cases: cases.map(({ top }) => top),
      rows: rows.flatMap(({ top }) => top),
      leading: atTop,
    }),
  };
}

function rowsOf(rangeCase: RangeCase, leading: Leading): RangeEnd[] {
  return leading.methods.map((method) => marked(leading, rangeCase, rangeMethods[method].end(rangeCase)));
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
