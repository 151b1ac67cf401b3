import type { Caution } from "../basis.ts";
import type { MarkerHorizon } from "../markers/result.ts";
import type { Contact } from "../study/model.ts";
import type { TimingAnswer, TimingMethod } from "./result.ts";
import { commonFields, type SetCase } from "./set-case.ts";
import { allCandidates } from "./sets.ts";
import { type Clustering, surfaceClustering } from "./surfaces.ts";

/** Kinds of horizon at which the record itself may break off. */
const surfaceKinds: ReadonlySet<MarkerHorizon["kind"]> = new Set(["flooding", "sequence-boundary", "hiatus"]);
const surfaceContacts: ReadonlySet<Contact> = new Set<Contact>(["erosive", "hardground", "karst"]);

interface Surface {
  readonly name: string;
  readonly heightM: number;
}

/** The surfaces that `timing.surfaces.horizons` names, else horizons of the kinds that break a record, and such contacts of beds. */
function surfacesOf({ section, horizons, settings }: SetCase): readonly Surface[] {
  const named = settings.timing.surfaces.horizons;
  const placed = horizons
    .filter(({ name, marker }) =>
      named.length > 0 ? named.includes(name) || named.includes(marker.name) : surfaceKinds.has(marker.kind),
    )
    .map(({ name, marker }) => ({ name, heightM: marker.positionM }));
  if (named.length > 0) return placed;
  const contacts = section.beds.flatMap(({ baseContact, baseM }) =>
    baseContact !== undefined && surfaceContacts.has(baseContact)
      ? [{ name: `${baseContact} contact`, heightM: baseM }]
      : [],
  );
  return [...placed, ...contacts];
}

/** Undefined where no zone is declared, no surface lies here, or no last find in the zone. */
function clusteringOf(setCase: SetCase): Clustering | undefined {
  const { set, coordinate, settings, originM } = setCase;
  const { zone, below } = settings.timing.surfaces;
  const surfaces = surfacesOf(setCase);
  if (zone === undefined || surfaces.length === 0) return undefined;
  const stretch = (lowM: number, highM: number) => ({
    low: coordinate.toEffective(lowM),
    high: coordinate.toEffective(highM),
  });
  return surfaceClustering(
    set.ranges.map((range) => range.last),
    surfaces.map(({ heightM }) => stretch(heightM - below, heightM)),
    stretch(originM + Math.min(...zone), originM + Math.max(...zone)),
  );
}

/** `surfaces`: do last finds cluster just below surfaces? For each set once a zone is declared; else it says how to. */
export function surfaceAnswers(setCase: SetCase): TimingAnswer[] {
  const { settings, set } = setCase;
  const { zone, below } = settings.timing.surfaces;
  if (zone === undefined && set.set !== allCandidates) return [];
  const surfaces = surfacesOf(setCase);
  const clustering = clusteringOf(setCase);
  return (["binomial", "shift"] as const satisfies readonly TimingMethod[]).map((method) => {
    const fields = {
      ...commonFields(setCase, clustering?.taxa ?? 0),
      question: "surfaces",
      method,
    } as const;
    if (clustering === undefined) return { ...fields, ...reasonFor(surfaces.length, zone !== undefined) };
    const { count, taxa, share, binomialP, shiftP } = clustering;
    const names = surfaces.map(({ name }) => name).join(", ");
    return {
      ...fields,
      testStatistic: count,
      p: method === "binomial" ? binomialP : shiftP,
      outcome: "closed",
      note: `${count} of ${taxa} last finds within ${below} m below ${names}: ${(100 * share).toFixed(1)}% of the zone`,
    };
  });
}

function reasonFor(surfaces: number, hasZone: boolean): Pick<TimingAnswer, "outcome" | "note"> {
  if (surfaces === 0) return { outcome: "not-applicable", note: "no surface in this section" };
  return hasZone
    ? { outcome: "undefined", note: "no last find in the zone" }
    : {
        outcome: "not-applicable",
        note: "declare timing.surfaces.zone, two heights in metres from the main horizon, before looking at last finds",
      };
}

/** Last finds that cluster below surfaces, and surfaces that are named but not placed here. */
export function surfaceCautions(setCase: SetCase): Caution[] {
  const { section, set, settings, confidence, horizons } = setCase;
  const place = { section: section.name, subject: set.set };
  const clustering = clusteringOf(setCase);
  const cautions: Caution[] = [];
  if (clustering !== undefined) {
    const { count, taxa, shiftP: p } = clustering;
    if (p <= 1 - confidence)
      cautions.push({ code: "timing-clustered-at-surfaces", ...place, numbers: { count, taxa, p } });
  }
  if (set.set !== allCandidates) return cautions;
  const placed = new Set(horizons.flatMap(({ name, marker }) => [name, marker.name]));
  for (const name of settings.timing.surfaces.horizons)
    if (!placed.has(name))
      cautions.push({ code: "timing-surface-not-placed", section: section.name, numbers: { name } });
  return cautions;
}
