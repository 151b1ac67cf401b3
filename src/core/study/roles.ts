import type { Candidate, Find, LocalTaxon, Role, RoleReason } from "./finds-result.ts";
import type { Section } from "./model.ts";
import type { Settings } from "./settings.ts";

/** What a role is judged against in one section: the main horizon H, and the smear where mixing is accepted. */
export interface Boundary {
  readonly positionM: number;
  readonly highM: number;
  /** Base of the smear, where mixing is accepted. */
  readonly smearBaseM?: number;
  /** The highest level at which a taxon that ended at H may still be found; undefined: no ceiling. */
  readonly ceilingOf: (taxon: LocalTaxon) => number | undefined;
}

export interface RolesInput {
  readonly section: Section;
  readonly taxa: readonly LocalTaxon[];
  readonly boundary?: Boundary;
  readonly settings: Settings;
}

export interface AssignedRoles {
  readonly candidates: readonly Candidate[];
  /** The taxa with the finds of candidates between H and their ceiling taken out. */
  readonly taxa: readonly LocalTaxon[];
}

/**
 * Gives each taxon of a section its one role against the main horizon, by rules that never read how close below H a
 * last find lies (choosing by closeness biases towards simultaneity: Solow & Smith 2000, Paleobiology 26:647-650).
 */
export function assignRoles(input: RolesInput): AssignedRoles {
  const assigned = input.taxa.map((taxon) => assignRole(taxon, input));
  return { candidates: assigned.map((a) => a.candidate), taxa: assigned.map((a) => a.taxon) };
}

function assignRole(taxon: LocalTaxon, { section, boundary, settings }: RolesInput) {
  const ceilingM = boundary?.ceilingOf(taxon);
  const kept = boundary === undefined ? taxon : withoutSmeared(taxon, boundary, ceilingM);
  const { role, reason } = roleOf({ taxon, kept }, boundary, { settings, ceilingM });
  const counted = role === "candidate" || role === "too-few" ? kept : taxon;
  const candidate: Candidate = {
    section: taxon.section,
    taxon: taxon.taxon,
    group: taxon.group,
    role,
    reachesTop: reachesTop(counted, section),
    horizons: horizonCount(counted),
    firstM: counted.heightsM[0],
    lastM: counted.heightsM[counted.heightsM.length - 1],
    lastInclusiveM: counted.lastInclusiveM,
    ...(ceilingM === undefined ? {} : { reworkingCeilingM: ceilingM }),
    findsBelowCeiling: taxon.heightsM.length - counted.heightsM.length,
    reason,
  };
  return { candidate, taxon: counted };
}

interface Limits {
  readonly settings: Settings;
  readonly ceilingM: number | undefined;
}

interface GivenRole {
  readonly role: Role;
  readonly reason: RoleReason;
}

const given = (
  role: Role,
  rule: RoleReason["rule"],
  [value, limit]: readonly [number, number],
): GivenRole => ({
  role,
  reason: { rule, value, limit },
});

function roleOf(
  { taxon, kept }: { readonly taxon: LocalTaxon; readonly kept: LocalTaxon },
  boundary: Boundary | undefined,
  { settings, ceilingM }: Limits,
): GivenRole {
  const first = taxon.heightsM[0];
  const horizons = horizonCount(kept);
  const minimum = settings.taxa.minimumHorizons;
  if (boundary !== undefined) {
    const { positionM, highM, smearBaseM } = boundary;
    if (smearBaseM !== undefined && first > smearBaseM)
      return given("aftermath", "first-above-base-of-smear", [first, smearBaseM]);
    if (first > positionM) return given("aftermath", "first-above-horizon", [first, positionM]);
    const last = taxon.lastStrictM;
    const limit = Math.max(highM, ceilingM ?? highM);
    if (last !== undefined && last > limit)
      return given("survivor", limit > highM ? "last-above-ceiling" : "last-above-interval", [last, limit]);
    const start = positionM + settings.timing.startBelow;
    if (first > start) return given("late-start", "first-above-start", [first, start]);
  }
  if (horizons < minimum) return given("too-few", "horizons-under-minimum", [horizons, minimum]);
  return boundary === undefined
    ? given("candidate", "no-horizon-here", [horizons, minimum])
    : given("candidate", "ends-in-question", [kept.heightsM[kept.heightsM.length - 1], boundary.highM]);
}

/** n counts horizons, never specimens; a range published without its finds brings its own number. */
export function horizonCount(taxon: LocalTaxon): number {
  return taxon.publishedHorizons ?? taxon.heightsM.length;
}

/**
 * Where mixing smears the layer upward it smears fossils too, so the finds of a taxon above H and up to its ceiling
 * are neither survival nor its end: they are taken out. Without accepted mixing nothing is taken out.
 */
function withoutSmeared(taxon: LocalTaxon, boundary: Boundary, ceilingM: number | undefined): LocalTaxon {
  if (ceilingM === undefined || taxon.publishedHorizons !== undefined) return taxon;
  const isKept = (heightM: number) => !isSmeared(heightM, boundary, ceilingM);
  const places = [...taxon.heightsM.keys()].filter((i) => isKept(taxon.heightsM[i]));
  if (places.length === taxon.heightsM.length || places.length === 0) return taxon;
  const heightsM = places.map((i) => taxon.heightsM[i]);
  const inclusive = (taxon.inclusiveHeightsM ?? []).filter(isKept);
  return {
    ...taxon,
    heightsM,
    samples: places.map((i) => taxon.samples[i]),
    ...(taxon.counts === undefined ? {} : { counts: places.map((i) => taxon.counts?.[i]) }),
    lastInclusiveM: Math.max(heightsM[heightsM.length - 1], ...inclusive),
  };
}

const isSmeared = (heightM: number, { positionM }: Boundary, ceilingM: number) =>
  heightM > positionM && heightM <= ceilingM;

const key = (section: string, taxon: string) => `${section}\u0000${taxon}`;

/** Marks the finds that the roles took out, so that every find's fate is told in one list. */
export function markBelowCeiling(
  finds: readonly Find[],
  candidates: readonly Candidate[],
  boundaries: ReadonlyMap<string, Boundary>,
): readonly Find[] {
  const trimmed = new Map(
    candidates
      .filter((c) => c.findsBelowCeiling > 0)
      .map((c) => [key(c.section, c.taxon), c.reworkingCeilingM]),
  );
  return finds.map((find) => {
    const boundary = boundaries.get(find.section);
    const ceilingM = trimmed.get(key(find.section, find.accepted));
    if (find.used === "no" || boundary === undefined || ceilingM === undefined) return find;
    return isSmeared(find.heightM, boundary, ceilingM)
      ? { ...find, used: "no", reason: "below-reworking-ceiling" }
      : find;
  });
}

/** True where the highest find lies in the highest sample searched for its group: the end is cut off by the section. */
export function reachesTop(taxon: LocalTaxon, section: Section): boolean {
  const searches = section.searches.filter((search) => search.group === taxon.group);
  if (searches.length === 0) return false;
  const top = searches.reduce((a, b) => (b.heightM > a.heightM ? b : a));
  const lastSample = taxon.samples[taxon.samples.length - 1];
  return lastSample === top.sample || taxon.heightsM[taxon.heightsM.length - 1] >= top.heightM;
}
