import { formatGiven } from "../heights.ts";
import { sameLevelM } from "../legs.ts";
import type { GivenHorizon, Section } from "../model.ts";
import { type Assembly, gather } from "./context.ts";
import { declaredHorizons } from "./declared-horizons.ts";

/** Horizons of a section that are compared with those of others, from below; the rest are left uncompared. */
const mostCompared = 200;

/** Two standard deviations hold 95 % of a normal error. */
const inStandardDeviations = 2;

/** A caution where a dated horizon is older than one below it by more than twice the error of their difference. */
export function checkAges(section: Section, { problems }: Assembly): void {
  let youngest: GivenHorizon | undefined;
  for (const upper of section.horizons) {
    if (upper.ageMa === undefined) continue;
    if (youngest !== undefined && isOlderAbove(youngest, upper)) {
      const found = `${upper.name} at ${upper.ageMa} Ma, above ${youngest.name} at ${youngest.ageMa} Ma`;
      problems.addOnce(section.name, "ages-out-of-order", {
        ...upper.origin,
        column: "age_ma",
        found,
        detail: section.name,
      });
    }
    if (youngest?.ageMa === undefined || upper.ageMa < youngest.ageMa) youngest = upper;
  }
}

function isOlderAbove(lower: GivenHorizon, upper: GivenHorizon): boolean {
  if (lower.ageMa === undefined || upper.ageMa === undefined) return false;
  const [a, b] = [lower.ageSigmaMa ?? 0, upper.ageSigmaMa ?? 0];
  return (
    upper.heightM > lower.heightM + sameLevelM &&
    upper.ageMa - lower.ageMa > inStandardDeviations * Math.sqrt(a * a + b * b)
  );
}

interface Placed {
  readonly name: string;
  readonly section: string;
  readonly horizon: GivenHorizon;
  readonly lowM: number;
  readonly highM: number;
}

/** A caution where two horizons lie in one order in a section and surely in the other in another section. */
export function checkHorizonOrder(sections: readonly Section[], { settings, problems }: Assembly): void {
  const declared = declaredHorizons(settings);
  const byName = new Map<string, Placed[]>();
  for (const section of sections) {
    for (const horizon of section.horizons) {
      const name = declared.get(JSON.stringify([section.name, horizon.name])) ?? horizon.name;
      gather(byName, name, { name, section: section.name, horizon, ...certain(horizon) });
    }
  }
  const bySection = new Map<string, Placed[]>();
  for (const list of byName.values()) {
    if (list.length > 1) for (const placed of list) gather(bySection, placed.section, placed);
  }
  const first = new Map<string, Placed>();
  for (const section of sections) {
    for (const [lower, upper] of orderedPairs(bySection.get(section.name) ?? [])) {
      const otherWay = first.get(JSON.stringify([upper.name, lower.name]));
      if (otherWay === undefined) {
        const key = JSON.stringify([lower.name, upper.name]);
        if (!first.has(key)) first.set(key, lower);
        continue;
      }
      problems.addOnce(JSON.stringify([lower.name, upper.name]), "horizon-order", {
        ...upper.horizon.origin,
        column: "horizon",
        found: `${upper.name} above ${lower.name} in ${section.name} (${formatGiven(upper.horizon.heightM, section)})`,
        detail: `${upper.name} below ${lower.name}, as in ${otherWay.section}`,
      });
    }
  }
}

/** The rock that surely holds a horizon: its half-widths, or two standard deviations each way. */
function certain({ heightM, belowM, aboveM, shape }: GivenHorizon) {
  const widths = shape === "normal" ? inStandardDeviations : 1;
  return { lowM: heightM - widths * belowM, highM: heightM + widths * aboveM };
}

function* orderedPairs(placed: readonly Placed[]): Generator<readonly [Placed, Placed]> {
  const upward = placed.toSorted((a, b) => a.horizon.heightM - b.horizon.heightM).slice(0, mostCompared);
  for (const [at, lower] of upward.entries()) {
    for (const upper of upward.slice(at + 1)) {
      if (upper.name !== lower.name && upper.lowM > lower.highM + sameLevelM) yield [lower, upper];
    }
  }
}
