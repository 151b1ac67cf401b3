import type { Basis } from "../basis.ts";
import {
  cooke1980,
  hall1982,
  marshall1994,
  mcInerny2006,
  robertsSolow2003,
  robsonWhitlock1964,
  solow1993Declining,
  solow2003,
  solow2005,
  straussSadler,
  wang2016,
} from "./sources.ts";

export const uniformBayesBasis: Basis = {
  method: "uniform-bayes",
  statement:
    "The posterior of the true end for uniform finds when a range is thought likely beforehand in proportion to 1 over its length: its bounds are those of the classical interval. The note gives the bound with both ends equally likely at every level (higher), and the one if the end lies within the section, with the share of the posterior that this cuts off; above 5 % that bound is driven by the prior.",
  assumptions: [
    "Finds are independent and equally likely at every level of the true range.",
    "The prior of the end is flat, or falls as 1 over the length, in the coordinate that grows with recovery.",
  ],
  sources: [straussSadler],
  after: true,
};

export const windowTrendBasis: Basis = {
  method: "window-trend",
  statement:
    "The chance that the last find lies as low as it does if the taxon lived on to the level asked about while its finds thinned out, or crowded, exponentially at an unknown rate; exact, given the number of finds and the sum of their distances from the base. Where even the highest level is not excluded the bound is open.",
  assumptions: ["Finds are independent and their density changes exponentially with level, at any rate."],
  sources: [solow1993Declining],
  after: true,
};

export const gapRankBasis: Basis = {
  method: "gap-rank",
  statement:
    "The unseen gap above the last find is no longer than the j-th smallest of N gaps seen with chance j / (N + 1), exactly; j is the least with that chance at or above the level asked for, and the chance is printed as the level.",
  assumptions: [
    "The gap above the last find is exchangeable with those below it: it fails where finds thin out towards the end.",
  ],
  sources: [marshall1994],
  after: true,
};

export const gapQuantileBasis: Basis = {
  method: "gap-quantile",
  statement:
    "The quantile of the law of gaps at the level asked for lies below the gap of a certain rank, and above another, with chance 0.95 each, by binomial counting.",
  assumptions: [
    "Gaps, the one above the last find among them, are independent draws of one law; for uniform finds the bound is conservative.",
  ],
  sources: [marshall1994],
  after: false,
};

export const weibullTailBasis: Basis = {
  method: "weibull-tail",
  statement:
    "The optimal linear estimate of the end from all finds, whose tail is taken to be of Weibull type with a shape estimated from them, and the upper bound that goes with it.",
  assumptions: [
    "Near the end the density of finds goes as a power of the distance to it.",
    "The bound holds in the limit of many finds; what it covers with few is stated beside it, from simulation.",
  ],
  sources: [cooke1980, hall1982, robertsSolow2003, solow2005],
  after: false,
};

export const decliningBasis: Basis = {
  method: "declining",
  statement:
    "The posterior of the true end when recovery rises or falls towards it at an unknown rate: density (1 + lambda) y^lambda or (1 - lambda) (1 - y)^(-lambda) of the relative position y, lambda normal with mean 0 and standard deviation 2 beforehand, the length likely in proportion to 1 over itself; by quadrature. The note gives the bounds with standard deviations 1 and 3.",
  assumptions: [
    "Recovery rises or falls steadily through the range, in the coordinate used; finds are independent.",
    "With the first find as base, rising recovery is taken to rise from there.",
  ],
  sources: [wang2016],
  after: true,
};

export const sightingRateBasis: Basis = {
  method: "sighting-rate",
  statement:
    "The chance of no find from the last one up to the level asked about if finds went on at their mean rate, in the form that does not depend on the unit of height. Given for comparison: the error of the rate is left out, and what the bound covers is stated beside it.",
  assumptions: ["Finds are a Poisson process of a rate known to be the observed one."],
  sources: [mcInerny2006],
  after: true,
};

export const twoHighestBasis: Basis = {
  method: "two-highest",
  statement:
    "The true end lies up to 1 / (C^(-1/beta) - 1) times the distance between the two highest finds above the highest; the point is the bound of level one half.",
  assumptions: [
    "Near the end the density of finds falls as the distance to it to the power beta - 1 (ranges.tail); nothing is assumed of the rest of the range.",
  ],
  sources: [robsonWhitlock1964, solow2003],
  after: true,
};

export const topKBasis: Basis = {
  method: "top-k",
  statement:
    "The bound from the k highest finds, by the law of the ratio of the distances of the highest and the k-th to the end; k = 2 is two-highest, all finds with beta = 1 the classical interval.",
  assumptions: [
    "The density of finds falls as the distance to the end to the power beta - 1 (ranges.tail) as far down as the k-th find (ranges.topFinds).",
  ],
  sources: [robsonWhitlock1964, solow2003],
  after: true,
};
