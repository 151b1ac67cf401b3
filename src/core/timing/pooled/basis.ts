import type { Basis } from "../../basis.ts";

const uniformFinds =
  "Finds are independent and uniform, in the recovery-weighted coordinate of their own section, over each true range.";
const oneLevel =
  "In each section all taxa of the set end at one level, and that level is the same in every section.";
const localEnd =
  "It speaks of the disappearance in these sections: one taxon found in several is several pieces of evidence about its last presence there, not about a wider end.";

/** Sections answered together, as the methods text states it. */
export const pooledBasis: readonly Basis[] = [
  {
    method: "pooled-offset",
    statement:
      "Posterior of the level, measured from the horizon, at which the taxa of several sections disappeared: the likelihood of each section with the error of its own pick integrated out, multiplied over sections, under a flat prior on timing.window; median, equal-tailed interval, densest interval (pooled-offset-densest), and the same without each section (pooled-offset-without).",
    assumptions: [
      uniformFinds,
      oneLevel,
      "Errors of picks are independent between sections, but for a shared one of timing.sharedError.",
      "Sections are never merged: the finds of each meet its own horizon alone.",
      "Metres from the horizon mean the same in every section, unless timing.jointScale is the common scale, or time by timing.rates.",
      localEnd,
    ],
    sources: [],
    after: false,
  },
  {
    method: "common-end",
    statement:
      "Between sections: each section's taxa, pooled, count as one in the exact test of a common end, chi-square with 2(S - 1) degrees of freedom.",
    assumptions: [uniformFinds, "Sections are placed on the scale without error."],
    sources: [
      {
        authors: "Hogg, R. V.",
        year: 1956,
        title: "On the distribution of the likelihood ratio",
        place: "Annals of Mathematical Statistics 27:529-532",
      },
    ],
    after: true,
  },
  {
    method: "scenarios",
    statement:
      "Between sections: evidence of one level common to all (single) against a level of its own in each (independent), equally likely beforehand.",
    assumptions: [
      uniformFinds,
      "Levels are flat over the window; a wider window speaks for the common level.",
    ],
    sources: [],
    after: false,
  },
];
