import { between, type Draws } from "./draws.ts";
import { heightAtKa, smearBaseM, toStep, upwardFromM, upwardFromOwn } from "./scale.ts";
import type { TrueSection, Truth } from "./truth.ts";

export interface ExampleBed {
  readonly base: number;
  readonly top: number;
  readonly lithology: string;
  readonly baseContact: string;
  readonly facies: string;
  readonly bioturbation: number;
  readonly carbonatePercent: number;
  readonly formation: string;
  readonly member: string;
  readonly notes: string;
}

interface Piece {
  readonly base: number;
  readonly top: number;
  readonly kind: "cycles" | "clay" | "ash";
  readonly notes: string;
}

const cyclesBelow = ["limestone", "marl", "marly limestone", "marl", "limestone", "marly limestone"];
const cyclesAbove = ["marl", "limestone", "claystone", "marly limestone"];
const rock: Readonly<Record<string, { density: number; carbonate: number; facies: string }>> = {
  limestone: { density: 2.52, carbonate: 86, facies: "outer shelf" },
  "marly limestone": { density: 2.42, carbonate: 68, facies: "outer shelf" },
  marl: { density: 2.31, carbonate: 45, facies: "hemipelagic" },
  claystone: { density: 2.24, carbonate: 14, facies: "hemipelagic" },
  bentonite: { density: 1.9, carbonate: 2, facies: "ash fall" },
};

export const densityOf = (lithology: string): number => rock[lithology]?.density ?? 2.3;

/** The visible contact: the event surface, or the cut where the event lies on one. */
export const contactM = (section: TrueSection): number =>
  section.contactRefersTo === "event-surface" ? section.eventSurfaceM : smearBaseM(section);

const ashThicknessM = 0.03;

function singularPieces(truth: Truth, section: TrueSection): Piece[] {
  const at = (heightM: number) => toStep(section, upwardFromM(section, heightM));
  const contact = contactM(section);
  const clay: Piece = {
    base: at(contact),
    top: at(section.eventSurfaceM + 3 * section.mixingLengthM),
    kind: "clay",
    notes: "dark clay, rusty at the foot, the Veyra impact layer",
  };
  const ashes = truth.ashes
    .filter((ash) => section.ashes.includes(ash.horizon))
    .map((ash): Piece => {
      const base = at(heightAtKa(section, ash.ka));
      const top = base + Math.max(section.step, toStep(section, upwardFromM(section, ashThicknessM)));
      return { base, top, kind: "ash", notes: `${ash.bed}, greasy, biotite flakes` };
    });
  return [clay, ...ashes].toSorted((a, b) => a.base - b.base);
}

function withCyclesBetween(singular: readonly Piece[], bottom: number, top: number): Piece[] {
  const pieces: Piece[] = [];
  let reached = bottom;
  for (const piece of singular) {
    if (piece.base > reached) pieces.push({ base: reached, top: piece.base, kind: "cycles", notes: "" });
    pieces.push(piece);
    reached = piece.top;
  }
  return [...pieces, { base: reached, top, kind: "cycles", notes: "" }];
}

function cutAround(piece: Piece, section: TrueSection): Piece[] {
  let left = [piece];
  for (const gap of section.intervals.filter((interval) => interval.kind !== "not-searched")) {
    const [from, to] = [upwardFromOwn(section, gap.base), upwardFromOwn(section, gap.top)];
    left = left.flatMap((part) =>
      to <= part.base || from >= part.top
        ? [part]
        : [
            { ...part, top: from },
            { ...part, base: to },
          ].filter((rest) => rest.top > rest.base),
    );
  }
  return left;
}

function bedOf(
  span: { base: number; top: number; notes: string },
  lithology: string,
  context: BedContext,
): ExampleBed {
  const { section, draws } = context;
  const isAbove = span.base >= toStep(section, upwardFromM(section, contactM(section)));
  const properties = rock[lithology];
  const isClay = lithology === "claystone";
  return {
    ...span,
    lithology,
    baseContact: draws.uniform() < 0.6 ? "gradational" : "sharp",
    facies: properties?.facies ?? "",
    bioturbation: lithology === "bentonite" ? 1 : Math.floor(between(draws, isClay ? 1 : 2, isClay ? 3 : 6)),
    carbonatePercent: Math.max(1, Math.round((properties?.carbonate ?? 40) + 5 * draws.normal())),
    formation: isAbove ? "Seddry Marl" : "Hurrim Limestone",
    member: isAbove ? "" : "Tolvane Member",
  };
}

interface BedContext {
  readonly section: TrueSection;
  readonly draws: Draws;
}

function cycleBeds(piece: Piece, context: BedContext): ExampleBed[] {
  const { section, draws } = context;
  const isAbove = piece.base >= toStep(section, upwardFromM(section, contactM(section)));
  const lithologies = isAbove ? cyclesAbove : cyclesBelow;
  const rate = upwardFromM(section, isAbove ? section.rateAboveMPerKa : section.rateBelowMPerKa);
  const beds: ExampleBed[] = [];
  let turn = Math.floor(between(draws, 0, lithologies.length));
  for (let base = piece.base; base < piece.top; ) {
    const drawn = toStep(section, base + between(draws, 5, 14) * rate);
    const top = piece.top - drawn < 3 * rate ? piece.top : drawn;
    beds.push(bedOf({ base, top, notes: "" }, lithologies[turn % lithologies.length] ?? "marl", context));
    base = top;
    turn += 1;
  }
  return beds;
}

/** Beds from below upward: limestone and marl in turn, the ashes, and the clay of the event. */
export function exampleBeds(truth: Truth, section: TrueSection, draws: Draws): ExampleBed[] {
  const context = { section, draws };
  const ends = [section.bottomM, section.topM].map((end) => toStep(section, upwardFromM(section, end)));
  const pieces = withCyclesBetween(singularPieces(truth, section), ends[0] ?? 0, ends[1] ?? 0);
  return pieces
    .flatMap((piece) => cutAround(piece, section))
    .flatMap((piece) => {
      if (piece.kind === "cycles") return cycleBeds(piece, context);
      const bed = bedOf(piece, piece.kind === "ash" ? "bentonite" : "claystone", context);
      const { base, top, notes } = piece;
      const baseContact = piece.kind === "clay" ? section.contact : "sharp";
      return [{ ...bed, base, top, notes, baseContact }];
    });
}

export const lithologyAt = (beds: readonly ExampleBed[], upward: number): string | undefined =>
  beds.find((bed) => upward >= bed.base && upward < bed.top)?.lithology;
