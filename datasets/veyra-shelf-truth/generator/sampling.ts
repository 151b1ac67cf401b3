import { densityOf, type ExampleBed, lithologyAt } from "./beds.ts";
import { between, type Draws, pick } from "./draws.ts";
import { metresFromUpward, smearBaseM, toStep, upwardFromM, upwardFromOwn } from "./scale.ts";
import type { TrueSection } from "./truth.ts";

export interface ExampleSample {
  readonly code: string;
  readonly kind: "bulk" | "slab" | "hand";
  /** On the section's own upward scale. */
  readonly base: number;
  readonly top: number;
  readonly heightM: number;
  readonly leg?: string;
  readonly lithology: string;
  readonly densityGCm3: number;
  readonly notes: string;
}

interface Place {
  readonly kind: ExampleSample["kind"];
  readonly base: number;
  readonly top: number;
  readonly leg?: string;
}

interface Reach {
  readonly from: number;
  readonly to: number;
  readonly leg?: string;
}

const fieldNotes = [
  "weathered face, cleaned back 20 cm",
  "splits kept",
  "burrows with dark fill",
  "wet, dried at 40 degrees",
  "under the thin limestone band",
  "small fault 1 m to the left, no offset seen",
  "roots",
  "sulphur stain",
];

function reaches(section: TrueSection): Reach[] {
  const ends = { from: upwardFromM(section, section.bottomM), to: upwardFromM(section, section.topM) };
  if (section.legs.length === 0) return [ends];
  return section.legs.map(({ leg, readings }) => ({
    from: readings[0]?.[1] ?? ends.from,
    to: readings.at(-1)?.[1] ?? ends.to,
    leg,
  }));
}

/** Number of legs that pass this level: where two do, each is sampled half as densely. */
const passes = (section: TrueSection, upward: number): number =>
  reaches(section).filter(({ from, to }) => upward >= from && upward <= to).length || 1;

const overlaps = (place: { base: number; top: number }, base: number, top: number): boolean =>
  place.base < top && place.top > base;

function isHidden(section: TrueSection, place: { base: number; top: number }): boolean {
  return section.intervals.some((interval) =>
    overlaps(place, upwardFromOwn(section, interval.base), upwardFromOwn(section, interval.top)),
  );
}

function slabs(section: TrueSection): Place[] {
  const leg = section.legs.at(-1)?.leg;
  return section.slabs.flatMap(({ base, thickness, number }) =>
    Array.from({ length: number }, (_, index): Place => {
      const from = upwardFromOwn(section, base) + index * thickness;
      return { kind: "slab", base: from, top: from + thickness, ...(leg === undefined ? {} : { leg }) };
    }),
  );
}

function bulk(section: TrueSection, draws: Draws): Place[] {
  const event = upwardFromM(section, section.eventSurfaceM);
  const dense = slabs(section);
  const [denseBase, denseTop] = [dense[0]?.base ?? event, dense.at(-1)?.top ?? event];
  const { spacingBelow, spacingAbove, thickness } = section.bulk;
  return reaches(section).flatMap(({ from, to, leg }) => {
    const places: Place[] = [];
    for (let upward = from + between(draws, 0.2, 0.6) * spacingBelow; upward < to - thickness; ) {
      const base = toStep(section, upward);
      const place: Place = {
        kind: "bulk",
        base,
        top: base + thickness,
        ...(leg === undefined ? {} : { leg }),
      };
      const isTaken = overlaps({ ...place, top: place.top + 1e-9 }, denseBase, denseTop);
      if (!isTaken && !isHidden(section, { ...place, top: place.top + 1e-9 })) places.push(place);
      const spacing = (upward < event ? spacingBelow : spacingAbove) * passes(section, upward);
      upward += Math.max(spacing * between(draws, 0.4, 1.6), thickness + section.step);
    }
    return places;
  });
}

/** The leg that a bed-by-bed search follows: the lower one as far as it goes. */
function legOf(section: TrueSection, top: number): string | undefined {
  return section.legs.find(({ readings }) => top <= (readings.at(-1)?.[1] ?? top))?.leg;
}

function handSearched(section: TrueSection, draws: Draws): Place[] {
  const event = {
    base: upwardFromM(section, smearBaseM(section)),
    top: upwardFromM(section, section.eventSurfaceM),
  };
  const places: Place[] = [];
  const end = upwardFromM(section, section.topM);
  const { spacing, thickness } = section.hand;
  for (let upward = upwardFromM(section, section.bottomM) + spacing * between(draws, 0.1, 0.4); ; ) {
    const base = toStep(section, upward);
    const top = toStep(section, base + between(draws, thickness[0], thickness[1]));
    if (top > end) return places;
    const leg = legOf(section, top);
    const place: Place = { kind: "hand", base, top, ...(leg === undefined ? {} : { leg }) };
    if (!isHidden(section, place) && !overlaps(event, base, top)) places.push(place);
    upward = Math.max(top + section.step, upward + spacing * between(draws, 0.6, 1.4));
  }
}

/** Field order: leg by leg upward; a core from its top down. */
function inFieldOrder(section: TrueSection, places: readonly Place[]): Place[] {
  const legs = section.legs.map(({ leg }) => leg);
  const rank = (place: Place) => (place.leg === undefined ? 0 : legs.indexOf(place.leg));
  const upward = section.axis === "depth" ? -1 : 1;
  return places.toSorted((a, b) => rank(a) - rank(b) || upward * (a.base - b.base));
}

/** Every sample of a section, coded in field order. */
export function exampleSamples(
  section: TrueSection,
  beds: readonly ExampleBed[],
  draws: Draws,
): ExampleSample[] {
  const series = [
    { prefix: "", digits: 3, places: [...bulk(section, draws), ...slabs(section)] },
    { prefix: section.axis === "depth" ? "S" : "M", digits: 2, places: handSearched(section, draws) },
  ];
  return series.flatMap(({ prefix, digits, places }) =>
    inFieldOrder(section, places).map((place, index): ExampleSample => {
      const middle = (place.base + place.top) / 2;
      const lithology = lithologyAt(beds, middle) ?? "marl";
      return {
        ...place,
        code: `${section.code}-${prefix}${String(index + 1).padStart(digits, "0")}`,
        heightM: metresFromUpward(section, middle),
        lithology,
        densityGCm3: Number((densityOf(lithology) + 0.04 * draws.normal()).toFixed(2)),
        notes: draws.uniform() < 0.05 ? pick(draws, fieldNotes) : "",
      };
    }),
  );
}
