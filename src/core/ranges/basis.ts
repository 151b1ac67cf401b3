import type { Basis } from "../basis.ts";
import {
  chenLiu,
  holland2003,
  marshall1997,
  mosimann1962,
  solow1993,
  solow2005,
  straussSadler,
  weissMarshall,
} from "./sources.ts";

export const coordinateBasis: Basis = {
  method: "recovery-coordinate",
  statement:
    "Levels are compared in a coordinate that grows with recovery: 0 in covered rock, lost core and rock not searched, elsewhere as the settings say, constant by default, and beyond the section's ends as at its edges. Limits are mapped back to height; a limit that falls into rock without recovery is the top of that rock.",
  assumptions: ["Recovery has the shape stated, the same for all taxa of a group."],
  sources: [marshall1997],
  after: true,
};

export const uniformBasis: Basis = {
  method: "uniform",
  statement:
    "The true end of a range lies up to ((1 - C)^(-1/m) - 1) times its length above the last find; the point estimate adds the mean gap.",
  assumptions: [
    "Finds are independent and equally likely at every level of the true range; where recovery falls towards the end, more finds make the interval worse.",
    "Horizons are counted, never specimens: m is their number, less one where the first find is the base.",
    "Each interval stands for one taxon; k intervals hold together at C^k.",
  ],
  sources: [straussSadler],
  after: false,
};

export const recoveryBasis: Basis = {
  method: "recovery",
  statement:
    "The interval of uniform finds in a coordinate that grows with recovery: of recovery.csv, of search effort per metre, of facies (finds between first and last ones per metre of each facies, pooled over the group's taxa, one find's worth drawn towards the mean) or of an exponential trend fitted to such finds; beyond its ends recovery stays as at its edges.",
  assumptions: [
    "Finds are independent and their density at each level of the true range is in proportion to the recovery stated there.",
    "Recovery is taken as known: the error of an estimated facies factor or trend is not in the interval.",
    "Confidence is constant through missing rock: an interval that passes a hiatus holds all of it.",
  ],
  sources: [marshall1997, holland2003],
  after: true,
};

export const windowBasis: Basis = {
  method: "window",
  statement:
    "The chance that the last find lies as low as it does if the taxon lived on to the level asked about (the main horizon, else the highest level searched for its group), and the evidence for living on over an earlier end.",
  assumptions: [
    "Finds are independent and equally likely at every level of the true range.",
    "The evidence ratio takes every end below that level to be equally likely beforehand.",
  ],
  sources: [solow1993, solow2005],
  after: false,
};

export const sampledBasis: Basis = {
  method: "sampled",
  statement:
    "Counts sampled horizons, barren ones included: the bound is the first sampled horizon above the largest number of barren ones that may still lie inside the true range. The point is the median of the posterior of the end, prior flat in height up to the section's end, detection p (effort e: 1 - exp(-lambda e), lambda exponential) uniform on (0, 1).",
  assumptions: [
    "The odds of a find in a sample of the range that was searched for the group are in proportion to its effort, where efforts differ and are given in one unit; else they are the same in every sample.",
    "The bound is exact and never covers less than its level.",
  ],
  sources: [weissMarshall, chenLiu],
  after: true,
};

export const countsBasis: Basis = {
  method: "counts",
  statement:
    "Counts per sample: given the total, specimens fall on samples as a Dirichlet-multinomial of weights kappa times effort, and p(j) is the chance that j further samples inside the true range hold none; the bound is the first barren sample above the largest j with p(j) above 1 - C. The point is the median of the posterior of the end over kappa from 1/16 to 16.",
  assumptions: [
    "Counts are negative binomial with the same mean and clumping per unit of effort throughout the true range; specimens are never taken as independent finds.",
    "Kappa is taken as known at its largest likelihood: with few samples the bound is somewhat too low, and the posterior bound in the note is wider.",
  ],
  sources: [mosimann1962],
  after: true,
};
