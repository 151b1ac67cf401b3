import type { Caution } from "../basis.ts";
import type { Markers } from "../markers/result.ts";
import type { Section, Study } from "../study/model.ts";
import { sectionBase } from "./base.ts";
import type { Leading } from "./leading.ts";
import type { RangeCase } from "./range-case.ts";
import { recoveryCautions } from "./recovery-cautions.ts";
import type { RangeEnd } from "./result.ts";
import { effortsNotComparable } from "./search-effort.ts";

interface SectionRanges {
  readonly section: Section;
  readonly study: Study;
  readonly markers: Markers;
  readonly cases: readonly RangeCase[];
  readonly rows: readonly RangeEnd[];
  readonly leading: Leading;
}

/** With so few horizons an interval mostly reflects its assumption. */
const FEW_HORIZONS = 4;

/** What weakens the range ends of one section. */
export function rangeCautions(input: SectionRanges): Caution[] {
  return [
    ...declineCautions(input),
    ...baseCautions(input),
    ...samplingCautions(input),
    ...recoveryCautions(input.section.name, input.cases, input.study.settings),
    ...counted(input, "range-few-horizons", ({ range }) => range.horizons <= FEW_HORIZONS),
    ...counted(input, "range-reaches-top", ({ reachesTop }) => reachesTop),
    ...counted(input, "range-published-only", ({ taxon }) => taxon.publishedHorizons !== undefined),
    ...outcomeCautions(input),
  ];
}

function declineCautions({ section, leading }: SectionRanges): Caution[] {
  const { decline, methods } = leading;
  if (decline === undefined) return [];
  const numbers = { p: decline.p, finds: decline.finds, method: methods[0] };
  return [{ code: "range-recovery-declines", section: section.name, numbers }];
}

function baseCautions({ section, study, markers, cases }: SectionRanges): Caution[] {
  const { base, isPlaced } = sectionBase(section, study.settings, markers);
  if (!isPlaced)
    return [{ code: "range-base-not-placed", section: section.name, subject: study.settings.ranges.base }];
  if (base.kind === "first") return [];
  const below = cases.filter(({ range }) => range.mode === "first").length;
  if (below === 0) return [];
  return [{ code: "range-base-above-finds", section: section.name, numbers: { taxa: below } }];
}

function samplingCautions({ section, study, cases }: SectionRanges): Caution[] {
  if (!study.settings.ranges.methods.includes("sampled")) return [];
  const cautions: Caution[] = [];
  const withFinds = cases.filter(({ taxon }) => taxon.publishedHorizons === undefined);
  const unsampled = withFinds.filter(
    ({ sampled, taxon }) => (sampled?.unsampledFinds ?? taxon.heightsM.length) > 0,
  );
  if (unsampled.length > 0) {
    const finds = unsampled.reduce((n, c) => n + (c.sampled?.unsampledFinds ?? c.taxon.heightsM.length), 0);
    cautions.push({
      code: "range-finds-outside-searches",
      section: section.name,
      numbers: { finds, taxa: unsampled.length },
    });
  }
  const unequal = [...new Set(cases.map(({ taxon }) => taxon.group))].flatMap((group) => {
    const reason = effortsNotComparable(section, group);
    return reason === undefined ? [] : [`${group}: ${reason}`];
  });
  if (unequal.length > 0)
    cautions.push({
      code: "range-unequal-effort",
      section: section.name,
      numbers: { groups: unequal.join("; ") },
    });
  return cautions;
}

function outcomeCautions({ section, rows }: SectionRanges): Caution[] {
  const of = (code: string, applies: (row: RangeEnd) => boolean): Caution[] => {
    const taxa = rows.filter(applies).length;
    return taxa === 0 ? [] : [{ code, section: section.name, numbers: { taxa } }];
  };
  return [
    ...of(
      "range-bound-above-section",
      (r) => r.method === "uniform" && r.outcome === "leaves-section" && r.highM !== undefined,
    ),
    ...of("range-bound-in-gap", (r) => r.method === "uniform" && r.outcome === "in-hiatus"),
    ...of("range-bound-open", (r) => r.method === "sampled" && r.outcome === "open"),
  ];
}

function counted(
  { section, cases }: SectionRanges,
  code: string,
  applies: (rangeCase: RangeCase) => boolean,
): Caution[] {
  const taxa = cases.filter(applies);
  if (taxa.length === 0) return [];
  return [
    {
      code,
      section: section.name,
      numbers: { taxa: taxa.length, names: taxa.map((c) => c.taxon.taxon).join(", ") },
    },
  ];
}
