import type { Occurrence, Origin, Taxon } from "../model.ts";
import { type ParsedName, parseName } from "../open-nomenclature.ts";
import type { RowOf } from "../tables/declare.ts";
import { occurrences } from "../tables/occurrences.ts";
import { type Assembly, type BySection, gather, present, type SectionFrame } from "./context.ts";
import { type Frames, frameFor } from "./frame-for.ts";
import { isQualifier, onlyQualifier } from "./one-mend.ts";
import { type Place, placeOf } from "./place.ts";
import { lengthOf } from "./position.ts";
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
  const nameOf = nameReader();
  for (const { cells, origin } of rowsOf(occurrences, assembly)) {
    const frame = frameFor(cells.section, origin, { frames, read, assembly });
    const place = frame && placeOf(cells, frame, { origin, samples, assembly });
    if (!frame || !place) continue;
    const find = findOf(cells, origin, { place, frame, name: nameOf(cells.taxon, cells.qualifier) });
    if (find.count === 0) {
      assembly.problems.addOnce("count", "count-zero", { ...origin, column: "count", found: "0" });
    }
    if (cells.qualifier !== undefined) tellQualifier(cells.qualifier, origin, assembly);
    if (!taxa.has(find.taxon)) addTaxon(find, taxa, assembly);
    gather(lists, frame.name, find);
  }
  return lists;
}

/** Parses each distinct name once. */
function nameReader(): (text: string, qualifier?: string) => ParsedName {
  const known = new Map<string, ParsedName>();
  return (text, qualifier = "") => {
    const key = `${text}\u0000${qualifier}`;
    const name = known.get(key) ?? parseName(text, qualifier);
    known.set(key, name);
    return name;
  };
}

/** A qualifier that is no sign of open nomenclature says nothing of the name. */
function tellQualifier(written: string, origin: Origin, { problems }: Assembly): void {
  if (isQualifier(written)) return;
  const now = onlyQualifier(written);
  const subject = JSON.stringify([written, now && origin.row]);
  problems.addOnce(subject, "unknown-qualifier", { ...origin, column: "qualifier", found: written, now });
}

function findOf(
  cells: RowOf<typeof occurrences>,
  origin: Origin,
  { place, frame, name }: { readonly place: Place; readonly frame: SectionFrame; readonly name: ParsedName },
): Occurrence {
  const positionErrorM = lengthOf(cells.position_error, frame) ?? place.sample?.positionErrorM;
  const leg = cells.leg ?? place.sample?.leg;
  return {
    verbatim: cells.taxon,
    taxon: name.name,
    ...present({ qualifier: name.qualifier, sample: place.sample?.name }),
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

/** A name without a row of its own takes the group of the row that spells it as the find does, or of its genus. */
function addTaxon(find: Occurrence, taxa: Map<string, Taxon>, assembly: Assembly): void {
  const group =
    taxa.get(find.verbatim)?.group ?? (isToGenus(find) ? genusGroup(find.taxon, taxa) : undefined);
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
