import type { Caution, Progress } from "../basis.ts";
import type { Markers } from "../markers/result.ts";
import type { Candidate, LocalTaxon } from "../study/finds-result.ts";
import { groupBy } from "../study/grouping.ts";
import type { Section, Study } from "../study/model.ts";
import { sectionBase, workingRange } from "./base.ts";
import { coordinateBasis } from "./basis.ts";
import { rangeCautions } from "./cautions.ts";
import { recoveryCoordinate } from "./coordinate.ts";
import { rangeMethods } from "./methods.ts";
import { note, type RangeCase } from "./range-case.ts";
import type { RangeEnd, RangeMethod, Ranges, Taper } from "./result.ts";
import { sampledHorizons, sampledRange } from "./sampled-horizons.ts";
import { taper } from "./taper.ts";
import { uniformEnd } from "./uniform-end.ts";

export interface RangesInput {
  readonly taxa: readonly LocalTaxon[];
  readonly candidates: readonly Candidate[];
  readonly markers: Markers;
}

/**
 * The true upper end of every taxon in every section, a row for each method of `ranges.methods`, and a taper each by
 * the leading one. Where the names read inclusively reach higher, `uniform` is given for them too.
 */
export function estimateRanges(study: Study, input: RangesInput, progress?: Progress): Ranges {
  const ends: RangeEnd[] = [];
  const tapers: Taper[] = [];
  const cautions: Caution[] = [];
  study.sections.forEach((section, index) => {
    progress?.(`ranges: ${section.name}`, index, study.sections.length);
    const cases = sectionCases(section, study, input);
    const rows = cases.map((rangeCase) =>
      study.settings.ranges.methods.map((m) => rangeMethods[m].end(rangeCase)),
    );
    ends.push(...rows.flatMap((ofTaxon, i) => [...ofTaxon, ...inclusiveEnds(cases[i])]));
    tapers.push(...cases.flatMap((rangeCase) => taperOf(rangeCase, study.settings.ranges.methods[0])));
    cautions.push(...rangeCautions({ section, study, markers: input.markers, cases, rows: rows.flat() }));
  });
  const basis = [
    coordinateBasis,
    ...study.settings.ranges.methods.map((method) => rangeMethods[method].basis),
  ];
  return { ends, tapers, cautions, basis };
}

function sectionCases(
  section: Section,
  study: Study,
  { taxa, candidates, markers }: RangesInput,
): RangeCase[] {
  const coordinate = recoveryCoordinate(section);
  const { base } = sectionBase(section, study.settings, markers);
  const horizon = markers.main.bySection.get(section.name);
  const ofSection = taxa.filter((t) => t.section === section.name && t.heightsM.length > 0);
  const byGroup = groupBy(ofSection, (t) => t.group);
  const horizons = new Map(
    [...byGroup.keys()].map((group) => [group, sampledHorizons(section, group, coordinate)]),
  );
  return ofSection.map((taxon) => {
    const range = workingRange(taxon, base, coordinate);
    const searched = horizons.get(taxon.group) ?? [];
    const sampled = sampledRange(taxon, range, searched);
    const candidate = candidates.find((c) => c.section === section.name && c.taxon === taxon.taxon);
    return {
      section,
      coordinate,
      taxon,
      reachesTop: candidate?.reachesTop ?? false,
      range,
      ...(sampled === undefined ? {} : { sampled }),
      searchedTopM: searched.length === 0 ? section.topM : searched[searched.length - 1].heightM,
      ...(horizon === undefined ? {} : { horizon }),
      confidence: study.settings.confidence,
      identification: study.settings.taxa.identification,
    };
  });
}

/** The last find under inclusive names counts as one more horizon: the least number that it can be. */
function inclusiveEnds(rangeCase: RangeCase): RangeEnd[] {
  const { taxon, range, coordinate, identification } = rangeCase;
  const lastM = taxon.lastInclusiveM;
  if (identification === "inclusive" || !(lastM > range.lastM)) return [];
  const inclusive = {
    ...range,
    lastM,
    last: coordinate.toEffective(lastM),
    horizons: range.horizons + 1,
    exponent: range.exponent + 1,
  };
  const row = uniformEnd({ ...rangeCase, range: inclusive, identification: "inclusive" });
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
