import type { Analysis } from "../../core/analysis-result.ts";
import { recoveryStance } from "../../core/ranges/leading.ts";
import type { Leaning, RangeEnd } from "../../core/ranges/result.ts";
import type { Section } from "../../core/study/model.ts";
import { inMetres, offset, percent, position } from "../wordings/numbers.ts";
import { name, plural, say, strong, type Words } from "../wordings/words.ts";
import { endWords } from "./end-words.ts";
import type { NumberLine } from "./finding.ts";
import { rowsOfEnd } from "./range-tops.ts";

/** What the ends of one taxon in one section come to. */
export interface TaxonFinding {
  readonly sentence: Words;
  /** Both ends by every method, the leading one first. */
  readonly methods: readonly TaxonLine[];
  readonly leaning?: Leaning;
}

export interface TaxonLine extends NumberLine {
  readonly top: RangeEnd;
}

/** One taxon of a section in words; undefined where no range of it is estimated there. */
export function taxonFinding(analysis: Analysis, section: Section, taxon: string): TaxonFinding | undefined {
  const tops = rowsOfEnd(analysis, section.name, "top").get(taxon) ?? [];
  const bases = rowsOfEnd(analysis, section.name, "base").get(taxon) ?? [];
  const [leading] = tops;
  if (leading === undefined) return undefined;
  const leaning = analysis.ranges.leanings.find(
    (one) => one.section === section.name && one.taxon === taxon && one.end === "top",
  );
  return {
    sentence: [
      ...topWords(analysis, section, leading),
      ...(leaning === undefined ? [] : leaningWords(section, leaning)),
    ],
    methods: tops.map((top) => methodLine(section, top, bases)),
    ...(leaning === undefined ? {} : { leaning }),
  };
}

function topWords(analysis: Analysis, section: Section, top: RangeEnd): Words {
  const { taxon, method, horizons, lastM, highM, outcome } = top;
  const last = say`${name(taxon)} was last found at ${position(section, lastM)}, in ${plural(horizons, "horizon")} in all.`;
  if (highM === undefined || (outcome !== "closed" && outcome !== "in-hiatus"))
    return say`${last} By ${method}: ${strong(endWords(section, top))} at ${percent(top.level)}.`;
  const main = analysis.markers.main.bySection.get(section.name);
  const against =
    main === undefined ? "" : `, ${offset(highM - main.positionM)}\u00a0m from the main horizon`;
  return say`${last} By ${method} its end lies no higher than ${strong(position(section, highM))} (${percent(
    top.level,
  )})${against}${outcome === "in-hiatus" ? ", in missing rock" : ""}.`;
}

/** How much the bound leans: where it moves as recovery is taken to have other shapes. */
export function leaningWords(section: Section, { nearestM, furthestM, bounds }: Leaning): Words {
  const unbounded = bounds.filter(({ boundM }) => boundM === undefined).length;
  const beside = unbounded === 0 ? "" : `; ${unbounded} of ${plural(bounds.length, "shape")} give no bound`;
  if (nearestM === undefined || furthestM === undefined)
    return say` Under no shape of recovery asked has it a bound.`;
  if (nearestM === furthestM)
    return say` Only one bound is known, at ${position(section, nearestM)}${beside}.`;
  return say` With other shapes of recovery the bound moves over ${strong(
    inMetres(Math.abs(furthestM - nearestM)),
  )}, from ${position(section, nearestM)} to ${position(section, furthestM)}${beside}.`;
}

const STANCES = {
  "holds-under-decline": "holds under decline",
  "fits-recovery": "fits recovery",
  "even-recovery": "",
} as const;

function methodLine(section: Section, top: RangeEnd, bases: readonly RangeEnd[]): TaxonLine {
  const base = bases.find(({ method }) => method === top.method);
  const notes = [
    base === undefined ? "" : `base ${endWords(section, base)}`,
    STANCES[recoveryStance(top.method)],
  ].filter((note) => note !== "");
  return { label: top.method, value: endWords(section, top), note: notes.join("; "), top };
}
