import type { LengthUnit, Quantity } from "./model.ts";

/** Metres in one unit; the US survey foot only where it is named. */
const lengths = new Map<string, { readonly metres: number } | { readonly perMetre: number }>([
  ["m", { perMetre: 1 }],
  ["cm", { perMetre: 100 }],
  ["mm", { perMetre: 1000 }],
  ["ft", { metres: 0.3048 }],
  ["in", { metres: 0.0254 }],
  ["us_survey_ft", { metres: 1200 / 3937 }],
]);

const lengthNames = new Map<string, string>([
  ...["m", "metre", "metres", "meter", "meters", "mtr"].map((name) => [name, "m"] as const),
  ...["cm", "centimetre", "centimetres", "centimeter", "centimeters"].map((name) => [name, "cm"] as const),
  ...["mm", "millimetre", "millimetres", "millimeter", "millimeters"].map((name) => [name, "mm"] as const),
  ...["ft", "foot", "feet", "'"].map((name) => [name, "ft"] as const),
  ...["in", "inch", "inches"].map((name) => [name, "in"] as const),
  ...["us_survey_ft", "us survey foot", "us survey feet", "us ft"].map(
    (name) => [name, "us_survey_ft"] as const,
  ),
]);

export const lengthUnits: readonly LengthUnit[] = ["m", "cm", "mm", "ft"];

/** The unit of a section that a written unit means, or undefined. */
export function lengthUnit(written: string): LengthUnit | undefined {
  const name = lengthNames.get(written.trim().toLowerCase());
  return lengthUnits.find((unit) => unit === name);
}

/** How the fixed units of columns are written in headers. */
const fixedUnitNames = new Map<string, readonly string[]>([
  ["g/cm3", ["g/cm3", "g/cm^3", "g cm-3", "g cm^-3", "g/cc", "t/m3"]],
  ["%", ["%", "percent", "per cent", "wt%"]],
  ["degrees", ["degrees", "degree", "deg", "°", "°n", "°e", "decimal degrees"]],
  ["Ma", ["ma", "myr", "mya"]],
]);

/** True where a unit written in a header is the fixed unit of its column. */
export const isFixedUnit = (written: string, unit: string): boolean =>
  lengthUnit(written) === unit ||
  (fixedUnitNames.get(unit) ?? []).includes(
    written.trim().normalize("NFKC").replaceAll("\u2212", "-").toLowerCase(),
  );

/**
 * Metres of a length. `unit`: m, cm, mm, ft (0.3048 m exactly), in, us_survey_ft (1200/3937 m); throws on any other.
 */
export function toMetres(value: number, unit: string): number {
  const ratio = lengthRatio(unit);
  return "perMetre" in ratio ? value / ratio.perMetre : value * ratio.metres;
}

/** The length in `unit` of a length in metres. */
export function fromMetres(metres: number, unit: string): number {
  const ratio = lengthRatio(unit);
  return "perMetre" in ratio ? metres * ratio.perMetre : metres / ratio.metres;
}

function lengthRatio(unit: string) {
  const ratio = lengths.get(unit);
  if (!ratio) throw new RangeError(`units.ts: expected m, cm, mm, ft, in or us_survey_ft, got ${unit}`);
  return ratio;
}

/** What a measurement's unit means: value x factor is in the canonical unit. */
export interface MeasurementUnit {
  readonly quantity: Quantity;
  readonly unit: string;
  readonly factor: number;
  /** The scale that a per mil unit names. */
  readonly scale?: string;
}

/** Mass fractions by their own names, in powers of ten of 1 ng/g; `ppt` is 1e-12, never parts per thousand. */
const massFractions = new Map<string, number>([
  ["ppt", -3],
  ["ppb", 0],
  ["ppm", 3],
  ["wt%", 7],
  ["wt.%", 7],
  ["%", 7],
  ["weight%", 7],
  ["mass%", 7],
]);

/** Powers of ten of a gram (SI prefixes). */
const grams = new Map<string, number>([
  ["fg", -15],
  ["pg", -12],
  ["ng", -9],
  ["ug", -6],
  ["mg", -3],
  ["g", 0],
  ["kg", 3],
]);

/** Power of ten of 1 ng/g of a mass fraction: by name, or a mass by a mass. A mass by a volume is none. */
function massFractionPower(unit: string): number | undefined {
  const named = massFractions.get(unit);
  if (named !== undefined) return named;
  const [above, below, ...more] = unit.split("/").map((mass) => grams.get(mass));
  return above === undefined || below === undefined || more.length > 0 ? undefined : above - below + 9;
}

const perMil = new Set(["per mil", "permil", "per mill", "permille", "per mille", "\u2030", "o/oo", "0/00"]);

/** International scales of isotope ratios, by their names without hyphens. */
const isotopeScales = new Set(["VPDB", "PDB", "VSMOW", "SMOW", "VCDT", "CDT", "AIR"]);

/** A per mil unit parted from the scale that it names: `\u2030 VPDB`, `per mil (V-SMOW)`, `permil vs PDB`. */
function partScale(unit: string): { readonly name: string; readonly scale?: string } {
  const [, name, written] = /^(.*?)[\s,(]+(?:vs\.?\s+)?([a-z-]+)\)?$/.exec(unit) ?? [];
  const scale = written?.toUpperCase().replaceAll("-", "");
  return name !== undefined && scale !== undefined && isotopeScales.has(scale)
    ? { name, scale }
    : { name: unit };
}

const percents = new Set(["percent", "per cent", "vol%", "% grains", "% of grains"]);
const counts = new Set(["count", "counts", "grains", "specimens", "spherules", "number", "n"]);
const polarities = new Set(["polarity", "n/r", "sign"]);
const others = new Set([
  "ratio",
  "1",
  "-",
  "dimensionless",
  "unitless",
  "si",
  "m3/kg",
  "am2/kg",
  "a/m",
  "degrees",
  "degree",
  "deg",
  "°",
  "api",
  "cps",
]);
const perGram =
  /^(?:(?:counts?|grains|spherules|specimens|number|n|1)\s*(?:\/|per\s)|\/|per\s)\s*(g|gram|kg|kilogram)$/;

/** Every unit accepted for a measurement, in words. */
export const measurementUnitsInWords =
  "ppt (1e-12), pg/g, ng/kg, ppb, ng/g, ug/kg, ppm, ug/g, mg/kg, wt%, per mil (with its scale: \u2030 VPDB), percent, grains/g, grains/kg, count, polarity, ratio, SI, m3/kg or degrees";

/** Both micro signs, minus signs and negative powers as one plain spelling. */
function plainUnit(written: string): string {
  return written
    .trim()
    .normalize("NFKC")
    .toLowerCase()
    .replaceAll("\u03bc", "u")
    .replaceAll("\u2212", "-")
    .replace(/\s+/g, " ")
    .replace(/[ .·]*\b(g|kg)\s?\^?-1$/, "/$1")
    .replace(/^wt %$/, "wt%")
    .replace(/\s*\/\s*/g, "/");
}

const perMilPossible = /^(?:δ|d|delta)[\s_-]*\d+|salinity|isotop/i;

/** What a written unit means for an analyte; `refused` where `ppt` could be taken for parts per thousand. */
export function measurementUnit(written: string, analyte: string): MeasurementUnit | "refused" | undefined {
  const unit = plainUnit(written);
  const given = written.trim();
  const power = massFractionPower(unit);
  if (unit === "ppt" && perMilPossible.test(analyte)) return "refused";
  if (power !== undefined) return { quantity: "mass-fraction", unit: "ng/g", factor: Number(`1e${power}`) };
  const { name, scale } = partScale(unit);
  if (scale !== undefined && perMil.has(name))
    return { quantity: "per-mil", unit: `\u2030 ${scale}`, factor: 1, scale };
  if (perMil.has(unit)) return { quantity: "per-mil", unit: "‰", factor: 1 };
  if (percents.has(unit)) return { quantity: "percent", unit: given, factor: 1 };
  if (counts.has(unit)) return { quantity: "count", unit: given, factor: 1 };
  if (polarities.has(unit)) return { quantity: "polarity", unit: "polarity", factor: 1 };
  const gram = perGram.exec(unit);
  if (gram) return perGramUnit(gram[1], given);
  if (others.has(unit))
    return { quantity: analyte === "polarity" ? "polarity" : "other", unit: given, factor: 1 };
  return undefined;
}

function perGramUnit(mass: string, given: string): MeasurementUnit {
  const isGram = mass === "g" || mass === "gram";
  return isGram
    ? { quantity: "per-gram", unit: given, factor: 1 }
    : {
        quantity: "per-gram",
        unit: given.replace(/k(g|ilogram)$/i, (_, rest: string) => (rest === "g" ? "g" : "gram")),
        factor: 1e-3,
      };
}

/** True for contents where a plain 0 is likely to mean "not detected": ppm and smaller. */
export const isTrace = (unit: MeasurementUnit): boolean =>
  unit.quantity === "mass-fraction" && unit.factor <= 1e3;
