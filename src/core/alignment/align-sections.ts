import type { Basis, Caution } from "../basis.ts";
import type { MarkerHorizon, Markers } from "../markers/result.ts";
import type { Study } from "../study/model.ts";
import { consensusPositions, type ObservedThickness } from "./consensus.ts";
import type { Alignment, SectionAlignment, Tie } from "./result.ts";

const basis: Basis = {
  method: "datum",
  statement:
    "Sections are set on one scale of thickness by their shared marker horizons, linear between two of them and " +
    "rigid beyond the outermost; errors are propagated to first order.",
  assumptions: [
    "a horizon of one name is the same surface in every section",
    "thickness between two shared horizons is proportional",
  ],
  sources: [],
  after: false,
};

interface Placed {
  readonly name: string;
  readonly horizon: MarkerHorizon;
}

/**
 * Lines the sections up on the main horizon (the datum, 0), or on it and further shared horizons.
 * Nothing is aligned while the main horizon is not shared between sections.
 */
export function alignSections(study: Study, markers: Markers): Alignment {
  const { beyond } = study.settings.alignment;
  const datum = markers.main.name;
  const empty = { horizons: [], beyond, sections: [], ties: [], basis: [basis] };
  if (datum === undefined || !markers.main.isShared)
    return { ...empty, cautions: study.sections.length > 1 ? [{ code: "datum-not-shared" }] : [] };
  const names = [...new Set([datum, ...study.settings.alignment.horizons])];
  const placed = study.sections.map((section) => placedHorizons(section.name, names, markers));
  const order = sharedOrder(placed, study);
  if (order.kind === "crossing") return { ...empty, datum, cautions: [order.caution] };
  const targets = targetPositions(order.names, { placed, study, datum });
  if (targets === undefined)
    return {
      ...empty,
      datum,
      cautions: [{ code: "alignment-order-refused", subject: order.names.join(", ") }],
    };
  const sections: SectionAlignment[] = [];
  const cautions: Caution[] = [];
  for (const [i, section] of study.sections.entries()) {
    const here = placed[i];
    if (here.length === 0)
      cautions.push({ code: "section-without-datum", section: section.name, subject: datum });
    else sections.push(sectionAlignment(section.name, here, targets));
  }
  return {
    datum,
    horizons: order.names,
    beyond,
    sections,
    ties: sections.flatMap(tiesOf),
    cautions,
    basis: [basis],
  };
}

/** The horizon of that name in a section: placed by hand, else given, else found. */
export function horizonIn(
  section: string,
  name: string,
  horizons: readonly MarkerHorizon[],
): MarkerHorizon | undefined {
  const here = horizons.filter((h) => h.section === section && h.horizon === name);
  const rank = { manual: 0, given: 1, found: 2 };
  return here.toSorted((a, b) => rank[a.source] - rank[b.source])[0];
}

function placedHorizons(section: string, names: readonly string[], markers: Markers): Placed[] {
  const placed: Placed[] = [];
  for (const name of names) {
    const isMain = name === markers.main.name;
    const horizon = isMain ? markers.main.bySection.get(section) : horizonIn(section, name, markers.horizons);
    if (horizon !== undefined) placed.push({ name, horizon });
  }
  return placed.toSorted((a, b) => a.horizon.positionM - b.horizon.positionM);
}

type SharedOrder =
  | { readonly kind: "order"; readonly names: readonly string[] }
  | { readonly kind: "crossing"; readonly caution: Caution };

/** One upward order of the horizons that every section agrees with, or the first pair that crosses. */
function sharedOrder(placed: readonly (readonly Placed[])[], study: Study): SharedOrder {
  const seenIn = new Map<string, string>();
  for (const [i, here] of placed.entries()) {
    for (const [k, lower] of here.entries())
      for (const upper of here.slice(k + 1)) {
        if (upper.horizon.positionM === lower.horizon.positionM) continue;
        const other = seenIn.get(JSON.stringify([upper.name, lower.name]));
        if (other !== undefined) return crossing([lower.name, upper.name], [study.sections[i].name, other]);
        seenIn.set(JSON.stringify([lower.name, upper.name]), study.sections[i].name);
      }
  }
  return {
    kind: "order",
    names: mergeOrders(
      placed.map((here) => here.map((p) => p.name)),
      seenIn,
    ),
  };
}

function crossing([lower, upper]: [string, string], [here, there]: [string, string]): SharedOrder {
  const numbers = { lower, upper, other: there };
  return { kind: "crossing", caution: { code: "horizons-cross", section: here, numbers } };
}

function mergeOrders(orders: readonly (readonly string[])[], below: ReadonlyMap<string, string>): string[] {
  const left = new Set(orders.flat());
  const merged: string[] = [];
  while (left.size > 0) {
    const candidates = [...left];
    const next =
      candidates.find((name) => !candidates.some((other) => below.has(JSON.stringify([other, name])))) ??
      candidates[0];
    merged.push(next);
    left.delete(next);
  }
  return merged;
}

interface TargetInput {
  readonly placed: readonly (readonly Placed[])[];
  readonly study: Study;
  readonly datum: string;
}

/** Target positions by name with the datum at 0; undefined where they do not rise upward. */
function targetPositions(
  names: readonly string[],
  input: TargetInput,
): ReadonlyMap<string, number> | undefined {
  const { placed, study, datum } = input;
  const reference = study.settings.alignment.reference;
  const used =
    reference === "consensus" ? placed : placed.filter((_, i) => study.sections[i].name === reference);
  const observed: ObservedThickness[] = used.flatMap((here) =>
    here.slice(1).map((upper, k) => ({
      from: names.indexOf(here[k].name),
      to: names.indexOf(upper.name),
      thicknessM: upper.horizon.positionM - here[k].horizon.positionM,
    })),
  );
  if (!connects(names.length, observed)) return undefined;
  const positions = consensusPositions(names.length, observed);
  if (positions.some((position, k) => k > 0 && position <= positions[k - 1])) return undefined;
  const zero = positions[names.indexOf(datum)];
  return new Map(names.map((name, k) => [name, positions[k] - zero]));
}

function connects(count: number, observed: readonly ObservedThickness[]): boolean {
  const reached = new Set([0]);
  for (let round = 0; round < count; round++)
    for (const { from, to } of observed) if (reached.has(from) || reached.has(to)) reached.add(from).add(to);
  return reached.size === count;
}

function sectionAlignment(
  section: string,
  here: readonly Placed[],
  targets: ReadonlyMap<string, number>,
): SectionAlignment {
  return {
    section,
    horizons: here.map((p) => p.name),
    heightsM: here.map((p) => p.horizon.positionM),
    sigmasM: here.map((p) => p.horizon.sigmaM),
    targets: here.map((p) => targets.get(p.name) ?? 0),
    targetSigmas: here.map(() => 0),
  };
}

/** The residual is how much thicker this section is, from the datum to the horizon, than the common scale. */
function tiesOf(alignment: SectionAlignment): Tie[] {
  const datum = Math.max(0, alignment.targets.indexOf(0));
  return alignment.horizons.map((horizon, k) => ({
    section: alignment.section,
    horizon,
    positionM: alignment.heightsM[k],
    common: alignment.targets[k],
    residual:
      alignment.heightsM[k] - alignment.heightsM[datum] - (alignment.targets[k] - alignment.targets[datum]),
  }));
}
