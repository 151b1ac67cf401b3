import { sameLevelM } from "../legs.ts";
import type { Occurrence, Origin, Sample, Taxon } from "../model.ts";
import { suggestName } from "../nearest.ts";
import { parseName } from "../open-nomenclature.ts";
import type { RowOf } from "../tables/declare.ts";
import { occurrences } from "../tables/occurrences.ts";
import { type Assembly, type BySection, gather, present, type SectionFrame } from "./context.ts";
import { type Frames, frameFor } from "./frames.ts";
import { lengthOf, type Slab, type SlabCells, slabOf } from "./position.ts";
import type { SampleLists } from "./read-samples.ts";
import { rowsOf } from "./rows.ts";
import { genusGroup, tellUngrouped, ungrouped } from "./taxa.ts";

/** Every usable find by section, in the order of the file. Taxa met without a row are added to `taxa` as ungrouped. */
export function readOccurrences(
  frames: Frames,
  { samples, taxa }: { readonly samples: SampleLists; readonly taxa: Map<string, Taxon> },
  assembly: Assembly,
): BySection<Occurrence> {
  const read = assembly.sheets.get("occurrences");
  const lists = new Map<string, Occurrence[]>();
  if (!read) return lists;
  for (const { cells, origin } of rowsOf(occurrences, assembly)) {
    const frame = frameFor(cells.section, origin, { frames, read, assembly });
    const place = frame && placeOf(cells, frame, { origin, samples, assembly });
    if (!frame || !place) continue;
    const find = findOf(cells, origin, { place, frame });
    if (find.count === 0) {
      assembly.problems.addOnce("count", "count-zero", { ...origin, column: "count", found: "0" });
    }
    if (!taxa.has(find.taxon)) addTaxon(find, taxa, assembly);
    gather(lists, frame.name, find);
  }
  return lists;
}

/** Where a find or measurement stands: in a sample, or at a position. */
export interface Place extends Slab {
  readonly sample?: Sample;
}

export interface PlaceSearch {
  readonly origin: Origin;
  readonly samples: SampleLists;
  readonly assembly: Assembly;
}

/** The place of a row that names a sample, a position, or both; both must agree. */
export function placeOf(
  cells: SlabCells & { readonly sample?: string },
  frame: SectionFrame,
  { origin, samples, assembly }: PlaceSearch,
): Place | undefined {
  const hasOwnPlace = cells.position !== undefined || (cells.base !== undefined && cells.top !== undefined);
  if (cells.sample === undefined) return slabOf(cells, frame, { origin, assembly });
  const known = samples.bySection.get(frame.name);
  const sample = known?.get(cells.sample);
  const told = { ...origin, column: "sample", found: cells.sample };
  if (!sample) {
    if (hasOwnPlace && !samples.areListed) slabOf(cells, frame, { origin, assembly });
    else if (!samples.areListed) assembly.problems.add("sample-without-position", told);
    else {
      const nearest = suggestName(cells.sample, known?.keys() ?? []);
      const subject = JSON.stringify([frame.name, cells.sample]);
      assembly.problems.addOnce(subject, "unknown-sample", { ...told, nearest });
    }
    return undefined;
  }
  const { baseM, topM, heightM } = sample;
  if (!hasOwnPlace) return { baseM, topM, heightM, sample };
  const own = slabOf(cells, frame, { origin, assembly });
  if (!own) return undefined;
  if (own.heightM < baseM - sameLevelM || own.heightM > topM + sameLevelM) {
    const detail = `row ${sample.origin.row} of ${sample.origin.file}`;
    assembly.problems.add("sample-elsewhere", { ...told, detail });
    return undefined;
  }
  return cells.base === undefined ? { baseM, topM, heightM, sample } : { ...own, sample };
}

function findOf(
  cells: RowOf<typeof occurrences>,
  origin: Origin,
  { place, frame }: { readonly place: Place; readonly frame: SectionFrame },
): Occurrence {
  const { name, qualifier } = parseName(cells.taxon, cells.qualifier);
  const positionErrorM = lengthOf(cells.position_error, frame) ?? place.sample?.positionErrorM;
  const leg = cells.leg ?? place.sample?.leg;
  return {
    verbatim: cells.taxon,
    taxon: name,
    ...present({ qualifier, sample: place.sample?.name }),
    heightM: place.heightM,
    ...present({ positionErrorM, leg, count: cells.count, abundance: cells.abundance }),
    reworked: cells.reworked ?? "no",
    doubtful: cells.doubtful ?? false,
    origin,
  };
}

/** True for a find that is not identified to the species, and so never ends a range. */
export const isToGenus = ({ qualifier }: Occurrence): boolean =>
  qualifier === "sp." || qualifier === "spp." || qualifier === "indet.";

function addTaxon(find: Occurrence, taxa: Map<string, Taxon>, assembly: Assembly): void {
  const group = isToGenus(find) ? genusGroup(find.taxon, taxa) : undefined;
  const taxon: Taxon = {
    name: find.taxon,
    group: group ?? ungrouped,
    traits: {},
    notes: "",
    origin: find.origin,
  };
  taxa.set(find.taxon, taxon);
  if (group === undefined) tellUngrouped(taxon, assembly);
}
