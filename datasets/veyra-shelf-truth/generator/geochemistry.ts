import { exp } from "../../../src/core/numeric/elementary.ts";
import { between, type Draws, pick, poisson } from "./draws.ts";
import type { ExampleSample } from "./sampling.ts";
import { kaAtHeight, metresFromUpward, smearBaseM } from "./scale.ts";
import type { TrueSection, Truth } from "./truth.ts";

export interface ExampleMeasurement {
  readonly sample: ExampleSample;
  readonly analyte: string;
  readonly value: string;
  readonly unit: string;
  readonly error?: string;
  readonly errorKind?: string;
  readonly detectionLimit?: string;
  readonly trials?: number;
  readonly amount?: string;
  readonly amountUnit?: string;
  readonly method: string;
}

interface Context {
  readonly truth: Truth;
  readonly section: TrueSection;
  readonly draws: Draws;
}

const absoluteErrorNgG = 0.003;

/** Three significant digits, as laboratories give them. */
const threeDigits = (value: number): string => String(Number(value.toPrecision(3)));

/**
 * Mean of the box-mixed layer over a sample, as a share of its value at the base of the smear:
 * (exp(-(l - hb)/L) - exp(-(b - hb)/L)) L/(b - l), l the greater of the sample's base and hb.
 */
function smearShare(section: TrueSection, sample: ExampleSample): number {
  const [hb, length] = [smearBaseM(section), section.mixingLengthM];
  const [base, top] = [metresFromUpward(section, sample.base), metresFromUpward(section, sample.top)];
  if (top <= hb) return 0;
  if (top - base < 1e-9) return exp(-(top - hb) / length);
  const from = Math.max(base, hb);
  return ((exp(-(from - hb) / length) - exp(-(top - hb) / length)) * length) / (top - base);
}

function excessNgG(section: TrueSection, sample: ExampleSample): number {
  const peak = section.fluenceNgCm2 / (section.mixingLengthM * 100 * sample.densityGCm3);
  return peak * smearShare(section, sample);
}

function iridium(sample: ExampleSample, { section, draws }: Context): ExampleMeasurement {
  const { background, lnSd, unit, errorKind, detectionLimits, relativeError } = section.iridium;
  const perNgG = unit === "pg/g" ? 1000 : 1;
  const truly = background * exp(lnSd * draws.normal()) + excessNgG(section, sample);
  const sigmaAt = (content: number) => Math.sqrt((relativeError * content) ** 2 + absoluteErrorNgG ** 2);
  const measured = truly + sigmaAt(truly) * draws.normal();
  const limit = pick(draws, detectionLimits);
  const common = {
    sample,
    analyte: "iridium",
    unit,
    detectionLimit: threeDigits(limit * perNgG),
    method: sample.kind === "slab" ? "nickel sulfide, ICP-MS" : "neutron activation",
  };
  if (measured < limit) return { ...common, value: `<${threeDigits(limit * perNgG)}` };
  const sigma = sigmaAt(measured);
  const sigmas = errorKind.startsWith("2s") ? 2 : 1;
  const error = errorKind.endsWith("%")
    ? ((100 * sigmas * sigma) / measured).toFixed(1)
    : threeDigits(sigmas * sigma * perNgG);
  return { ...common, value: threeDigits(measured * perNgG), error, errorKind };
}

function nickel(sample: ExampleSample, { truth, section, draws }: Context): ExampleMeasurement {
  const background = 38 * exp(0.16 * draws.normal());
  const value = background + truth.iridiumToNickelPpmPerNgG * excessNgG(section, sample);
  return {
    sample,
    analyte: "nickel",
    value: value.toFixed(0),
    unit: "ppm",
    error: "6",
    errorKind: "1s%",
    method: "ICP-MS",
  };
}

function shockedQuartz(sample: ExampleSample, { truth, section, draws }: Context): ExampleMeasurement {
  const grains = 60 + 10 * draws.integer(25);
  const share = truth.peak.shockedQuartzShare * smearShare(section, sample);
  let shocked = 0;
  for (let grain = 0; grain < grains; grain++) if (draws.uniform() < share) shocked += 1;
  return {
    sample,
    analyte: "shocked-quartz",
    value: String(shocked),
    unit: "count",
    trials: grains,
    method: "universal stage",
  };
}

function spherules(sample: ExampleSample, { truth, section, draws }: Context): ExampleMeasurement {
  const grams = between(draws, 2, 6).toFixed(1);
  const value = poisson(draws, Number(grams) * truth.peak.spherulesPerGram * smearShare(section, sample));
  return {
    sample,
    analyte: "spherules",
    value: String(value),
    unit: "count",
    amount: grams,
    amountUnit: "g",
    method: "picked, 63-500 um",
  };
}

function carbonIsotopes(sample: ExampleSample, { truth, section, draws }: Context): ExampleMeasurement {
  const { beforePerMil, stepPerMil, recoveryKa } = truth.carbon;
  const ka = kaAtHeight(section, sample.heightM);
  const step = ka < 0 ? 0 : stepPerMil * exp(-ka / recoveryKa);
  const value = beforePerMil + step + 0.11 * draws.normal();
  return {
    sample,
    analyte: "d13c",
    value: value.toFixed(2),
    unit: "per mil",
    error: "0.05",
    errorKind: "1s",
    method: "bulk carbonate, VPDB",
  };
}

function mercuryAndCarbon(sample: ExampleSample, { truth, section, draws }: Context): ExampleMeasurement[] {
  const ka = kaAtHeight(section, sample.heightM);
  const { fromKa, toKa, factor } = truth.mercury;
  const organic = (sample.lithology === "claystone" ? 0.75 : 0.42) * exp(0.3 * draws.normal());
  const perPercent = 46 * (ka > fromKa && ka < toKa ? factor : 1);
  const mercury = perPercent * organic * exp(0.15 * draws.normal());
  return [
    {
      sample,
      analyte: "mercury",
      value: threeDigits(mercury),
      unit: "ppb",
      error: "5",
      errorKind: "1s%",
      method: "thermal release",
    },
    {
      sample,
      analyte: "toc",
      value: organic.toFixed(2),
      unit: "wt%",
      error: "0.03",
      errorKind: "1s",
      method: "combustion",
    },
  ];
}

function polarity(sample: ExampleSample, { truth, section }: Context): ExampleMeasurement {
  const value = kaAtHeight(section, sample.heightM) < truth.reversalKa ? "N" : "R";
  return { sample, analyte: "polarity", value, unit: "polarity", method: "stepwise thermal" };
}

/** Where two legs pass, the lower leg is left to the fossils: its samples are measured for nothing. */
function isMeasured(section: TrueSection, sample: ExampleSample): boolean {
  const nextStart = section.legs.at(-1)?.readings[0]?.[1];
  const isLowerLeg = sample.leg !== undefined && sample.leg !== section.legs.at(-1)?.leg;
  return sample.kind !== "hand" && !(isLowerLeg && nextStart !== undefined && sample.top > nextStart);
}

/** What the laboratories returned, sample by sample. */
export function exampleMeasurements(
  context: Context & { readonly samples: readonly ExampleSample[] },
): ExampleMeasurement[] {
  const { section, draws } = context;
  return context.samples.flatMap((sample, index) => {
    const chance = draws.uniform();
    if (!isMeasured(section, sample)) return [];
    const isSlab = sample.kind === "slab";
    const isNear = Math.abs(kaAtHeight(section, sample.heightM)) < 90;
    const measurements: ExampleMeasurement[] = [];
    if (isSlab || chance < (isNear ? 0.9 : 0.55)) measurements.push(iridium(sample, context));
    if (isSlab || chance < (isNear ? 0.6 : 0.3)) measurements.push(nickel(sample, context));
    if (isSlab || (isNear && chance < 0.2))
      measurements.push(shockedQuartz(sample, context), spherules(sample, context));
    if (isSlab ? index % 2 === 0 : chance > 0.35) measurements.push(carbonIsotopes(sample, context));
    if (isSlab ? index % 3 === 0 : chance > 0.55) measurements.push(...mercuryAndCarbon(sample, context));
    if (!isSlab && chance > 0.5) measurements.push(polarity(sample, context));
    return measurements;
  });
}
