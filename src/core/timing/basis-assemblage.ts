import type { Basis, Source } from "../basis.ts";

const springer1990: Source = {
  authors: "Springer, M. S.",
  year: 1990,
  title: "The effect of random range truncations on patterns of evolution in the fossil record",
  place: "Paleobiology 16:512-520",
};
const marshall1995: Source = {
  authors: "Marshall, C. R.",
  year: 1995,
  title:
    "Distinguishing between sudden and gradual extinctions in the fossil record: predicting the position of the Cretaceous-Tertiary iridium anomaly using the ammonite fossil record on Seymour Island, Antarctica",
  place: "Geology 23:731-734",
};
const marshallWard1996: Source = {
  authors: "Marshall, C. R. & Ward, P. D.",
  year: 1996,
  title: "Sudden and gradual molluscan extinctions in the latest Cretaceous of western European Tethys",
  place: "Science 274:1360-1363",
  doi: "10.1126/science.274.5291.1360",
};
const robsonWhitlock1964: Source = {
  authors: "Robson, D. S. & Whitlock, J. H.",
  year: 1964,
  title: "Estimation of a truncation point",
  place: "Biometrika 51:33-39",
  doi: "10.1093/biomet/51.1-2.33",
};
const solow2003: Source = {
  authors: "Solow, A. R.",
  year: 2003,
  title: "Estimation of stratigraphic ranges when fossil finds are not randomly distributed",
  place: "Paleobiology 29:181-185",
};
const wangEverson2007: Source = {
  authors: "Wang, S. C. & Everson, P. J.",
  year: 2007,
  title: "Confidence intervals for pulsed mass extinction events",
  place: "Paleobiology 33:324-336",
  doi: "10.1666/06056.1",
};
const wangZhong2018: Source = {
  authors: "Wang, S. C. & Zhong, L.",
  year: 2018,
  title: "Estimating the number of pulses in a mass extinction",
  place: "Paleobiology 44:199-218",
  doi: "10.1017/pab.2016.30",
};
const besagClifford1991: Source = {
  authors: "Besag, J. & Clifford, P.",
  year: 1991,
  title: "Sequential Monte Carlo p-values",
  place: "Biometrika 78:301-304",
  doi: "10.1093/biomet/78.2.301",
};
const spearman1904: Source = {
  authors: "Spearman, C.",
  year: 1904,
  title: "The proof and measurement of association between two things",
  place: "American Journal of Psychology 15:72-101",
  doi: "10.2307/1412159",
};
const faithSurovell2009: Source = {
  authors: "Faith, J. T. & Surovell, T. A.",
  year: 2009,
  title: "Synchronous extinction of North America's Pleistocene mammals",
  place: "Proceedings of the National Academy of Sciences 106:20641-20645",
  doi: "10.1073/pnas.0908153106",
};
const signorLipps1982: Source = {
  authors: "Signor, P. W. & Lipps, J. H.",
  year: 1982,
  title: "Sampling bias, gradual extinction patterns and catastrophes in the fossil record",
  place: "Geological Society of America Special Paper 190:291-296",
  doi: "10.1130/SPE190-p291",
};
const meldahl1990: Source = {
  authors: "Meldahl, K. H.",
  year: 1990,
  title:
    "Sampling, species abundance, and the stratigraphic signature of mass extinction: a test using Holocene tidal flat molluscs",
  place: "Geology 18:890-893",
};

const uniformFinds =
  "Finds are independent and uniform, in the recovery-weighted coordinate, over each true range.";

/** Methods for an assemblage beside the common end and the duration. */
export const assemblageBasis: readonly Basis[] = [
  {
    method: "combined",
    statement:
      "At a level, -2 sum ln of the chances that each last find lies this low is chi-square if all ended there; large where last finds lie too far below. Over an interval the largest p.",
    assumptions: [uniformFinds],
    sources: [springer1990],
    after: true,
  },
  {
    method: "half-intervals",
    statement:
      "If all ranges end at one level, half of their 50% intervals end below it: an interval of that level between two of those ends, and a two-sided binomial test at a horizon.",
    assumptions: [uniformFinds, "The level printed is the exact coverage that the number of taxa allows."],
    sources: [marshall1995, marshallWard1996],
    after: true,
  },
  {
    method: "two-highest",
    statement:
      "Levels at which all ranges could have ended, from the two highest finds of each alone; empty where no common level fits.",
    assumptions: [
      "Near the end the density of finds falls as the distance to it to the power tail - 1; a decline lower down does no harm.",
      "With a tail less steep than the decline it still puts the end too low: it is given for two tails.",
    ],
    sources: [robsonWhitlock1964, solow2003],
    after: true,
  },
  {
    method: "separation",
    statement:
      "Exact interval of the height between the ends of two declared groups, each pooled as one range, later minus earlier.",
    assumptions: [
      uniformFinds,
      "Each group ended at one level.",
      "The groups were declared before the last finds were seen; chosen from them, the interval lies too far from 0.",
    ],
    sources: [wangEverson2007],
    after: true,
  },
  {
    method: "pulses-bootstrap",
    statement:
      "Gain in likelihood by one more pulse, against the gains in assemblages simulated from as many pulses as are tested, with the same numbers of finds and bases. Information criteria are not used: they split a single pulse nearly always.",
    assumptions: [
      uniformFinds,
      "Simulated pulses stand at their median-unbiased levels; where recovery declines upward one pulse is split.",
    ],
    sources: [wangZhong2018, besagClifford1991],
    after: true,
  },
  {
    method: "rank-correlation",
    statement:
      "Do rarer taxa disappear lower? Spearman's rho of abundance and last find, one-sided p by permutation; exact for nine taxa or fewer.",
    assumptions: [
      "A strong correlation favours one end seen through sampling; it is no test of one level by itself.",
      "The number of horizons is tied to the last find where ends differ; horizons per metre between the end finds are not.",
    ],
    sources: [spearman1904, faithSurovell2009],
    after: true,
  },
  {
    method: "last-finds",
    statement:
      "Number of last finds above each level if all ranges ended together at the estimated common level, given each taxon's number of finds: exact mean and pointwise band, and a simulated band that holds the whole curve.",
    assumptions: [uniformFinds, "The common level is estimated from the same last finds."],
    sources: [signorLipps1982, meldahl1990],
    after: true,
  },
];
