import { valueAt } from "../coded.ts";
import { hasNoRecovery, isWithin } from "../finds.ts";
import { formatGiven } from "../heights.ts";
import { sameLevelM } from "../legs.ts";
import type { Section } from "../model.ts";
import { occurrenceColumns, placeOfFind } from "../occurrence-list.ts";
import type { Assembly } from "./context.ts";
import { isToGenus } from "./occurrences.ts";
import { firstAlike } from "./repeated-rows.ts";

/** Cautions on finds that give no range, contradict each other, or lie where nobody could look. */
export function checkFinds(section: Section, assembly: Assembly): void {
  checkLevels(section, assembly);
  checkTwice(section, assembly);
  checkAbundance(section, assembly);
  checkHidden(section, assembly);
}

function checkLevels({ name, occurrences }: Section, { problems }: Assembly): void {
  const finds = occurrenceColumns(occurrences);
  const { taxon, qualifier, count, heightM, rows } = finds;
  const isNoSpecies = qualifier.values.map((sign) => isToGenus({ qualifier: sign }));
  const seen = taxon.values.map(() => ({ first: -1, times: 0, levels: 1 }));
  for (let find = 0; find < rows.length; find++) {
    if (valueAt(count, find) === 0 || isNoSpecies[qualifier.codes[find]]) continue;
    const of = seen[taxon.codes[find]];
    if (of.times === 0) of.first = find;
    of.times += 1;
    if (Math.abs(valueAt(heightM, find) - valueAt(heightM, of.first)) > sameLevelM) of.levels = 2;
  }
  for (const { first, times, levels } of seen.filter(({ times }) => times > 0).toSorted(inOrder)) {
    if (levels > 1) continue;
    const code = times === 1 ? "one-occurrence" : "one-level";
    const found = `${valueAt(taxon, first)} in ${name}`;
    problems.addOnce(name, code, { ...placeOfFind(finds, first, "taxon"), found });
  }
}

const inOrder = (a: { readonly first: number }, b: { readonly first: number }) => a.first - b.first;

/** One taxon named twice for a sample, alike in all but its number: a slip, or two parts of one count. */
function checkTwice({ name, occurrences }: Section, { problems }: Assembly): void {
  const finds = occurrenceColumns(occurrences);
  const { taxon, sample, qualifier, reworked, doubtful, rows } = finds;
  const isAlike = (a: number, b: number) =>
    [qualifier, reworked, doubtful].every(
      (column) => valueAt<unknown>(column, a) === valueAt<unknown>(column, b),
    );
  const firstLike = firstAlike([taxon.codes, sample.codes], rows.length);
  for (let find = 0; find < rows.length; find++) {
    const first = valueAt(sample, find) === undefined ? undefined : firstLike(find);
    if (first !== undefined && isAlike(first, find)) {
      const found = `${valueAt(taxon, find)} in ${valueAt(sample, find)}`;
      const detail = String(rows[first]);
      problems.addOnce(name, "find-twice", { ...placeOfFind(finds, find, "taxon"), found, detail });
    }
  }
}

const absent = /^(?:0|-|\u2013|absent|none|barren)$/i;

/** A count and an abundance in one row of which one says found and the other not found. */
function checkAbundance({ name, occurrences }: Section, { problems }: Assembly): void {
  const finds = occurrenceColumns(occurrences);
  const { count, abundance, rows } = finds;
  const isAbsent = abundance.values.map((text) => text !== undefined && absent.test(text));
  for (let find = 0; find < rows.length; find++) {
    const [number, text] = [valueAt(count, find), valueAt(abundance, find)];
    if (number === undefined || text === undefined) continue;
    if ((number === 0) === isAbsent[abundance.codes[find]]) continue;
    const found = `count ${number}, abundance ${text}`;
    problems.addOnce(name, "count-against-abundance", { ...placeOfFind(finds, find, "count"), found });
  }
}

/** Finds inside rock that nobody could search. */
function checkHidden(section: Section, assembly: Assembly): void {
  const finds = occurrenceColumns(section.occurrences);
  const { taxon, sample, count, heightM, rows } = finds;
  const hidden = section.intervals.filter(hasNoRecovery);
  const hiding = heightM.values.map((height) => hidden.find((each) => isWithin(height, each)));
  if (hiding.every((interval) => interval === undefined)) return;
  for (let find = 0; find < rows.length; find++) {
    const interval = hiding[heightM.codes[find]];
    if (interval === undefined || valueAt(count, find) === 0) continue;
    const ends = [interval.baseM, interval.topM].map((height) => formatGiven(height, section));
    assembly.problems.addOnce(`${section.name} ${interval.origin.row}`, "find-in-hidden-rock", {
      ...placeOfFind(finds, find, valueAt(sample, find) === undefined ? "position" : "sample"),
      found: `${valueAt(taxon, find)} at ${formatGiven(valueAt(heightM, find), section)}`,
      detail: `the ${interval.kind} interval (${ends.join(" to ")})`,
    });
  }
}
