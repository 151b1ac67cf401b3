import { formatGiven } from "../heights.ts";
import { unionOfIntervals } from "../intervals.ts";
import { sameLevelM } from "../legs.ts";
import type { Sample, Section } from "../model.ts";
import type { Assembly } from "./context.ts";

/** Cautions on rock that is logged twice or not at all, and on rock that two samples hold. */
export function checkRock(section: Section, assembly: Assembly): void {
  checkBedOverlap(section, assembly);
  checkBedGaps(section, assembly);
  checkSampleOverlap(section, assembly);
}

function checkBedOverlap(section: Section, { problems }: Assembly): void {
  let topM = -Infinity;
  for (const bed of section.beds) {
    if (bed.baseM < topM - sameLevelM) {
      const found = `${formatGiven(bed.baseM, section)}, where the bed below reaches ${formatGiven(topM, section)}`;
      problems.addOnce(section.name, "beds-overlap", { ...bed.origin, column: "base", found });
    }
    topM = Math.max(topM, bed.topM);
  }
}

/** Rock between two beds that neither a bed nor an interval tells of. */
function checkBedGaps(section: Section, { problems }: Assembly): void {
  const { beds, intervals } = section;
  if (beds.length === 0) return;
  const told = unionOfIntervals([...beds, ...intervals]);
  let at = 0;
  for (let next = 1; next < told.length; next++) {
    const gap = { baseM: told[next - 1].topM, topM: told[next].baseM };
    while (at < beds.length && beds[at].baseM < gap.topM) at += 1;
    if (at === 0 || gap.topM - gap.baseM <= sameLevelM) continue;
    if (at === beds.length) return;
    const found = `nothing from ${formatGiven(gap.baseM, section)} to ${formatGiven(gap.topM, section)}`;
    problems.addOnce(section.name, "beds-gap", { ...beds[at].origin, column: "base", found });
  }
}

/** Slabs of one leg that share rock and were both searched for one group, or measured for one analyte. Legs overlap by their nature. */
function checkSampleOverlap(section: Section, { problems }: Assembly): void {
  const slabs = new Map<string, Sample>();
  for (const [slab, other] of sharedRock(section.samples)) slabs.set(slab.name, slab).set(other.name, other);
  if (slabs.size === 0) return;
  for (const [purpose, names] of purposesOf(section)) {
    const own = [...names].flatMap((name) => slabs.get(name) ?? []);
    for (const [slab, other] of sharedRock(own)) {
      const found = `${slab.name} and ${other.name}`;
      const subject = JSON.stringify([section.name, purpose]);
      problems.addOnce(subject, "samples-overlap", {
        ...slab.origin,
        column: "sample",
        found,
        detail: purpose,
      });
    }
  }
}

/** The samples of a section by what they were searched or measured for. */
function purposesOf({ searches, measurements }: Section): ReadonlyMap<string, ReadonlySet<string>> {
  const purposes = new Map<string, Set<string>>();
  const note = (purpose: string, sample: string) => {
    const names = purposes.get(purpose);
    if (names) names.add(sample);
    else purposes.set(purpose, new Set([sample]));
  };
  for (const { group, sample } of searches) note(`searched for ${group}`, sample);
  for (const { analyte, sample } of measurements)
    if (sample !== undefined) note(`measured for ${analyte}`, sample);
  return purposes;
}

/** Each slab that begins below the top of one before it on its leg, with that one. */
function* sharedRock(samples: readonly Sample[]): Generator<readonly [Sample, Sample]> {
  const highest = new Map<string | undefined, Sample>();
  const slabs = samples.filter(({ baseM, topM }) => topM > baseM);
  for (const slab of slabs.toSorted((a, b) => a.baseM - b.baseM || a.topM - b.topM)) {
    const below = highest.get(slab.leg);
    if (below !== undefined && slab.baseM < below.topM - sameLevelM) yield [slab, below];
    if (below === undefined || slab.topM > below.topM) highest.set(slab.leg, slab);
  }
}
