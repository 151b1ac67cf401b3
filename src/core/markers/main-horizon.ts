import type { Caution } from "../basis.ts";
import type { Settings } from "../study/settings.ts";
import type { MainHorizon, MarkerHorizon } from "./result.ts";

export interface SettledHorizons {
  readonly horizons: readonly MarkerHorizon[];
  readonly main: MainHorizon;
  readonly cautions: readonly Caution[];
}

type Boundary = Settings["boundary"];

/** Beyond this many joint standard deviations a given and a found horizon of one name are said to differ. */
const differenceSigmas = 2;

/**
 * Gives horizons the names they answer to (`boundary.same`) and settles the main horizon H: the declared name, else
 * the one given `impact` horizon name; two or more of those are `ambiguous`; with none, section by section the found
 * iridium horizon of largest fluence, shared only where all of them were declared one horizon. Where a section has a
 * given and a found horizon of the name, the given one is H; one placed by hand comes before both.
 */
export function settleMainHorizon(found: readonly MarkerHorizon[], boundary: Boundary): SettledHorizons {
  const renamed = renameDeclared(found, boundary);
  const { main, cautions } = chooseMain(renamed.horizons, boundary.horizon);
  const byHand = pickCautions(renamed.horizons, boundary);
  return { horizons: renamed.horizons, main, cautions: [...renamed.cautions, ...cautions, ...byHand] };
}

/** How far each pick by hand lies from the automatic horizon beside it, and picks in sections that are not there. */
function pickCautions(horizons: readonly MarkerHorizon[], { picks }: Boundary): readonly Caution[] {
  const sections = new Set(horizons.map((h) => h.section));
  const lost = picks
    .filter(({ section }) => !sections.has(section))
    .map(({ section, horizon }) => ({ code: "pick-not-placed", section, subject: horizon }));
  const moved = horizons
    .filter((h) => h.source === "manual")
    .flatMap((pick): Caution[] => {
      const beside = horizons.find(
        (h) => h.section === pick.section && h.horizon === pick.horizon && h.source !== "manual",
      );
      if (beside === undefined) return [];
      const numbers = { source: beside.source, differenceM: pick.positionM - beside.positionM };
      return [{ code: "horizon-placed-by-hand", section: pick.section, subject: pick.horizon, numbers }];
    });
  return [...lost, ...moved];
}

function renameDeclared(horizons: readonly MarkerHorizon[], { same }: Boundary) {
  const cautions: Caution[] = [];
  const names = new Map<string, string>();
  for (const { name, horizons: members } of same)
    for (const [section, member] of members) {
      const isThere = horizons.some((h) => h.section === section && h.name === member);
      if (isThere) names.set(key(section, member), name);
      else cautions.push({ code: "same-horizon-missing", section, subject: member, numbers: { name } });
    }
  const renamed = horizons.map((h) => ({ ...h, horizon: names.get(key(h.section, h.name)) ?? h.horizon }));
  return { horizons: renamed, cautions };
}

function key(section: string, name: string): string {
  return `${section}\u0000${name}`;
}

function chooseMain(horizons: readonly MarkerHorizon[], declared: string | undefined) {
  if (declared !== undefined) return byName(horizons, declared, "setting");
  const given = horizons.filter((h) => h.source === "given" && h.kind === "impact");
  const names = [...new Set(given.map((h) => h.horizon))];
  if (names.length === 1) return byName(horizons, names[0], "given-impact");
  if (names.length > 1) {
    const listed = Object.fromEntries(names.map((name, i) => [`name${i + 1}`, name]));
    const main: MainHorizon = { settledBy: "ambiguous", isShared: false, bySection: new Map() };
    return {
      main,
      cautions: [{ code: "main-horizon-ambiguous", numbers: { count: names.length, ...listed } }],
    };
  }
  return bySectionFluence(horizons);
}

function byName(horizons: readonly MarkerHorizon[], name: string, settledBy: "setting" | "given-impact") {
  const cautions: Caution[] = [];
  const bySection = new Map<string, MarkerHorizon>();
  for (const section of sectionsOf(horizons)) {
    const here = horizons.filter((h) => h.section === section && h.horizon === name);
    if (here.length === 0) continue;
    const byHand = here.find((h) => h.source === "manual");
    const given = here.filter((h) => h.source === "given");
    const found = here.filter((h) => h.source === "found").toSorted(byFluence);
    bySection.set(section, byHand ?? given[0] ?? found[0]);
    for (const kind of [given, found])
      if (kind.length > 1)
        cautions.push({ code: "horizon-twice", section, subject: name, numbers: { count: kind.length } });
    if (given.length > 0 && found.length > 0) cautions.push(...difference(given[0], found[0]));
  }
  if (bySection.size === 0) cautions.push({ code: "boundary-horizon-unknown", subject: name });
  const main: MainHorizon = { name, settledBy, isShared: true, bySection };
  return { main, cautions };
}

function difference(given: MarkerHorizon, found: MarkerHorizon): readonly Caution[] {
  const apart = found.positionM - given.positionM;
  const sigma = Math.sqrt(given.sigmaM ** 2 + found.sigmaM ** 2);
  if (!(Math.abs(apart) > differenceSigmas * sigma)) return [];
  const numbers = {
    found: found.name,
    givenM: given.positionM,
    foundM: found.positionM,
    differenceM: apart,
    ...(sigma > 0 ? { sigmas: Math.abs(apart) / sigma } : {}),
  };
  return [{ code: "given-found-differ", section: given.section, subject: given.horizon, numbers }];
}

function bySectionFluence(horizons: readonly MarkerHorizon[]) {
  const iridium = horizons.filter((h) => h.source === "found" && h.name.startsWith("iridium-"));
  const chosen = sectionsOf(iridium).map(
    (section) => iridium.filter((h) => h.section === section).toSorted(byFluence)[0],
  );
  if (chosen.length === 0) {
    const main: MainHorizon = { settledBy: "none", isShared: false, bySection: new Map() };
    return { main, cautions: [{ code: "no-main-horizon" }] };
  }
  const placed = chosen.map(
    (h) =>
      horizons.find(
        (other) => other.section === h.section && other.horizon === h.horizon && other.source === "manual",
      ) ?? h,
  );
  const isDeclared = chosen.every((h) => h.horizon === chosen[0].horizon && h.horizon !== h.name);
  const main: MainHorizon = {
    ...(isDeclared || chosen.length === 1 ? { name: chosen[0].horizon } : {}),
    settledBy: "found-iridium",
    isShared: isDeclared || chosen.length === 1,
    bySection: new Map(placed.map((h) => [h.section, h])),
  };
  const code = main.isShared ? "main-horizon-found" : "main-horizon-by-section";
  const cautions: readonly Caution[] = [{ code, numbers: { sections: chosen.length } }];
  return { main, cautions };
}

/** The horizon of largest fluence first; of equal ones the lowest. */
export function byFluence(a: MarkerHorizon, b: MarkerHorizon): number {
  return (b.fluence?.value ?? 0) - (a.fluence?.value ?? 0) || a.positionM - b.positionM;
}

function sectionsOf(horizons: readonly MarkerHorizon[]): readonly string[] {
  return [...new Set(horizons.map((h) => h.section))];
}
