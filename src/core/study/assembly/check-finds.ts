import { hasNoRecovery, isWithin } from "../finds.ts";
import { formatGiven } from "../heights.ts";
import { sameLevelM } from "../legs.ts";
import type { Occurrence, Section } from "../model.ts";
import { type Assembly, gather } from "./context.ts";
import { isToGenus } from "./occurrences.ts";

/** Cautions on finds that give no range, contradict each other, or lie where nobody could look. */
export function checkFinds(section: Section, assembly: Assembly): void {
  checkLevels(section, assembly);
  checkTwice(section, assembly);
  checkAbundance(section, assembly);
  checkHidden(section, assembly);
}

function checkLevels({ name, occurrences }: Section, assembly: Assembly): void {
  const byTaxon = new Map<string, Occurrence[]>();
  for (const find of occurrences) if (find.count !== 0 && !isToGenus(find)) gather(byTaxon, find.taxon, find);
  for (const [taxon, finds] of byTaxon) {
    if (finds.some(({ heightM }) => Math.abs(heightM - finds[0].heightM) > sameLevelM)) continue;
    const code = finds.length === 1 ? "one-occurrence" : "one-level";
    const found = `${taxon} in ${name}`;
    assembly.problems.addOnce(name, code, { ...finds[0].origin, column: "taxon", found });
  }
}

/** One taxon named twice for a sample, alike in all but its number: a slip, or two parts of one count. */
function checkTwice({ name, occurrences }: Section, { problems }: Assembly): void {
  const seen = new Map<string, Map<string, Occurrence>>();
  for (const find of occurrences) {
    if (find.sample === undefined) continue;
    const ofTaxon = seen.get(find.taxon) ?? new Map<string, Occurrence>();
    seen.set(find.taxon, ofTaxon);
    const first = ofTaxon.get(find.sample);
    if (first === undefined) ofTaxon.set(find.sample, find);
    else if (isAlike(first, find)) {
      problems.addOnce(name, "find-twice", {
        ...find.origin,
        column: "taxon",
        found: `${find.taxon} in ${find.sample}`,
        detail: String(first.origin.row),
      });
    }
  }
}

const isAlike = (a: Occurrence, b: Occurrence): boolean =>
  a.qualifier === b.qualifier && a.reworked === b.reworked && a.doubtful === b.doubtful;

const absent = /^(?:0|-|\u2013|absent|none|barren)$/i;

/** A count and an abundance in one row of which one says found and the other not found. */
function checkAbundance({ name, occurrences }: Section, { problems }: Assembly): void {
  for (const { count, abundance, origin } of occurrences) {
    if (count === undefined || abundance === undefined) continue;
    if ((count === 0) === absent.test(abundance)) continue;
    const found = `count ${count}, abundance ${abundance}`;
    problems.addOnce(name, "count-against-abundance", { ...origin, column: "count", found });
  }
}

/** Finds inside rock that nobody could search. */
function checkHidden(section: Section, assembly: Assembly): void {
  const hidden = section.intervals.filter(hasNoRecovery);
  for (const find of section.occurrences) {
    if (find.count === 0) continue;
    const interval = hidden.find((each) => isWithin(find.heightM, each));
    if (interval === undefined) continue;
    const ends = [interval.baseM, interval.topM].map((heightM) => formatGiven(heightM, section));
    assembly.problems.addOnce(`${section.name} ${interval.origin.row}`, "find-in-hidden-rock", {
      ...find.origin,
      column: find.sample === undefined ? "position" : "sample",
      found: `${find.taxon} at ${formatGiven(find.heightM, section)}`,
      detail: `the ${interval.kind} interval (${ends.join(" to ")})`,
    });
  }
}
