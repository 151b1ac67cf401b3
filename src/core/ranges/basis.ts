import type { Basis, Source } from "../basis.ts";

const straussSadler: Source = {
  authors: "Strauss, D. & Sadler, P. M.",
  year: 1989,
  title: "Classical confidence intervals and Bayesian probability estimates for ends of local taxon ranges",
  place: "Mathematical Geology 21:411-427",
  doi: "10.1007/BF00897326",
};
const marshall1997: Source = {
  authors: "Marshall, C. R.",
  year: 1997,
  title: "Confidence intervals on stratigraphic ranges with nonrandom distributions of fossil horizons",
  place: "Paleobiology 23:165-173",
};
const solow1993: Source = {
  authors: "Solow, A. R.",
  year: 1993,
  title: "Inferring extinction from sighting data",
  place: "Ecology 74:962-964",
};
const solow2005: Source = {
  authors: "Solow, A. R.",
  year: 2005,
  title: "Inferring extinction from a sighting record",
  place: "Mathematical Biosciences 195:47-55",
};
const weissMarshall: Source = {
  authors: "Weiss, R. E. & Marshall, C. R.",
  year: 1999,
  title:
    "The uncertainty in the true end point of a fossil's stratigraphic range when stratigraphic sections are sampled discretely",
  place: "Mathematical Geology 31:435-453",
};

export const coordinateBasis: Basis = {
  method: "recovery-coordinate",
  statement:
    "Levels are compared in a coordinate that grows with recovery: 0 in covered rock, lost core and rock not searched, constant elsewhere and beyond the section's ends. Limits are mapped back to height; a limit that falls into rock without recovery is the top of that rock.",
  assumptions: ["Recovery is constant wherever rock was searched."],
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
    "Counts sampled horizons, barren ones included: the bound is the first sampled horizon above the largest number of barren ones that may still lie inside the true range.",
  assumptions: [
    "The chance of a find is the same in every sample of the range that was searched for the group (equal effort).",
    "The bound is exact and never covers less than its level.",
  ],
  sources: [weissMarshall],
  after: true,
};
