import { type Coded, countValues } from "../coded.ts";
import { acceptedName } from "../finds.ts";
import type { Origin, Section, Study, Taxon } from "../model.ts";
import type { OccurrenceColumns } from "../occurrence.ts";
import { occurrenceColumns, placeOfFind } from "../occurrence-list.ts";
import type { Assembly } from "./context.ts";
import { declaredHorizons } from "./declared-horizons.ts";
import type { SearchList } from "./search-list.ts";
import { similarNames } from "./similar-names.ts";
import { ungrouped } from "./taxa.ts";

/** How often a name is used and where it stands first. */
interface Use {
  readonly origin: Origin & { readonly column?: string };
  uses: number;
  /** Stands in the table that lists the names of its kind. */
  readonly isListed: boolean;
}

interface Naming {
  readonly kind: "taxon" | "section" | "sample" | "group" | "horizon";
  readonly byLetter: boolean;
  readonly areApart?: (first: string, second: string) => boolean;
}

interface Named extends Pick<Study, "sections" | "taxa"> {
  readonly searches: ReadonlyMap<string, SearchList>;
}

/** Cautions on names that are almost alike. None is merged: only a person knows whether one thing is meant. */
export function checkNames({ sections, taxa, searches }: Named, assembly: Assembly): void {
  tellSimilar(taxonUses(sections, taxa, assembly), assembly, {
    kind: "taxon",
    byLetter: true,
    areApart: (first, second) => areSettled(first, second, taxa),
  });
  tellSimilar(sectionUses(sections), assembly, { kind: "section", byLetter: true });
  tellSimilar(groupUses({ sections, taxa, searches }, assembly), assembly, { kind: "group", byLetter: true });
  tellSimilar(horizonUses(sections, assembly), assembly, { kind: "horizon", byLetter: true });
  for (const { samples } of sections) {
    const uses = new Map<string, Use>();
    for (const { name, origin } of samples) use(uses, name, origin);
    tellSimilar(uses, assembly, { kind: "sample", byLetter: false });
  }
}

function tellSimilar(uses: ReadonlyMap<string, Use>, { problems }: Assembly, naming: Naming): void {
  const { kind, byLetter, areApart } = naming;
  for (const { first, second } of similarNames([...uses.keys()], { byLetter })) {
    if (areApart?.(first, second)) continue;
    const [usual, odd] = rank(uses.get(second)) > rank(uses.get(first)) ? [second, first] : [first, second];
    const at = uses.get(odd);
    if (!at) continue;
    problems.add("similar-name", { column: kind, ...at.origin, found: odd, detail: kind, nearest: usual });
  }
}

/** A name that is listed, then one that is used more often, is the likelier to be meant. */
const rank = (use: Use | undefined): number =>
  use === undefined ? 0 : use.uses + (use.isListed ? Number.MAX_SAFE_INTEGER / 2 : 0);

function use(uses: Map<string, Use>, name: string, origin: Use["origin"], isListed = false): void {
  const known = uses.get(name);
  if (known) known.uses += 1;
  else uses.set(name, { origin, uses: 1, isListed });
}

/** Names that end at one accepted name are settled; so are those of which one accepts itself. */
function areSettled(first: string, second: string, taxa: ReadonlyMap<string, Taxon>): boolean {
  const acceptsItself = (name: string) => taxa.get(name)?.accepted === name;
  return (
    acceptsItself(first) || acceptsItself(second) || acceptedName(first, taxa) === acceptedName(second, taxa)
  );
}

/** The file whose rows list taxa and groups; undefined where there is none. */
const listingFile = (assembly: Assembly) => assembly.sheets.get("taxa")?.sheet.file;

function taxonUses(
  sections: readonly Section[],
  taxa: ReadonlyMap<string, Taxon>,
  assembly: Assembly,
): ReadonlyMap<string, Use> {
  const uses = new Map<string, Use>();
  const listed = listingFile(assembly);
  for (const { name, origin } of taxa.values()) {
    if (origin.file === listed) use(uses, name, origin, true);
  }
  for (const { occurrences, publishedRanges } of sections) {
    const finds = occurrenceColumns(occurrences);
    useColumn(uses, ["taxon", finds.taxon], finds);
    for (const { taxon, origin } of publishedRanges) use(uses, taxon, origin);
  }
  return uses;
}

/** Uses every name of a column as often as it stands there. */
function useColumn(
  uses: Map<string, Use>,
  [kind, column]: readonly [Naming["kind"], Coded<string>],
  columns: Pick<OccurrenceColumns, "file" | "rows" | "stands">,
): void {
  const counts = countValues(column);
  for (const [code, name] of column.values.entries()) {
    use(uses, name, placeOfFind(columns, column.codes.indexOf(code), kind));
    const known = uses.get(name);
    if (known) known.uses += counts[code] - 1;
  }
}

function sectionUses(sections: readonly Section[]): ReadonlyMap<string, Use> {
  const uses = new Map<string, Use>();
  for (const section of sections) {
    const { occurrences, measurements, publishedRanges, samples, horizons, beds } = section;
    const lists = [occurrences, measurements, publishedRanges, samples, horizons, beds];
    const origin = section.origin ?? lists.find((list) => list.length > 0)?.at(0)?.origin;
    if (origin === undefined) continue;
    const count = lists.reduce((sum, { length }) => sum + length, 0);
    uses.set(section.name, { origin, uses: count, isListed: false });
  }
  return uses;
}

function groupUses({ sections, taxa, searches }: Named, assembly: Assembly): ReadonlyMap<string, Use> {
  const uses = new Map<string, Use>();
  const listed = listingFile(assembly);
  for (const { group, origin } of taxa.values()) {
    if (group !== ungrouped && origin.file === listed) use(uses, group, origin, true);
  }
  for (const list of searches.values()) {
    if (list.kind === "columns") useColumn(uses, ["group", list.columns.group], list.columns);
    else for (const { group, origin } of list.items) if (origin) use(uses, group, origin);
  }
  for (const { recovery } of sections) {
    for (const { group, origin } of recovery) use(uses, group, origin);
  }
  return uses;
}

/** Horizons by the name they are correlated by. */
function horizonUses(sections: readonly Section[], { settings }: Assembly): ReadonlyMap<string, Use> {
  const uses = new Map<string, Use>();
  const declared = declaredHorizons(settings);
  for (const section of sections) {
    for (const { name, origin } of section.horizons) {
      if (!declared.has(JSON.stringify([section.name, name]))) use(uses, name, origin);
    }
  }
  return uses;
}
