import type { Source } from "../basis.ts";

export const straussSadler: Source = {
  authors: "Strauss, D. & Sadler, P. M.",
  year: 1989,
  title: "Classical confidence intervals and Bayesian probability estimates for ends of local taxon ranges",
  place: "Mathematical Geology 21:411-427",
  doi: "10.1007/BF00897326",
};
export const marshall1997: Source = {
  authors: "Marshall, C. R.",
  year: 1997,
  title: "Confidence intervals on stratigraphic ranges with nonrandom distributions of fossil horizons",
  place: "Paleobiology 23:165-173",
};
export const holland2003: Source = {
  authors: "Holland, S. M.",
  year: 2003,
  title: "Confidence limits on fossil ranges that account for facies changes",
  place: "Paleobiology 29:468-479",
};
export const solow1993: Source = {
  authors: "Solow, A. R.",
  year: 1993,
  title: "Inferring extinction from sighting data",
  place: "Ecology 74:962-964",
};
export const solow2005: Source = {
  authors: "Solow, A. R.",
  year: 2005,
  title: "Inferring extinction from a sighting record",
  place: "Mathematical Biosciences 195:47-55",
};
export const weissMarshall: Source = {
  authors: "Weiss, R. E. & Marshall, C. R.",
  year: 1999,
  title:
    "The uncertainty in the true end point of a fossil's stratigraphic range when stratigraphic sections are sampled discretely",
  place: "Mathematical Geology 31:435-453",
};
export const marshall1994: Source = {
  authors: "Marshall, C. R.",
  year: 1994,
  title:
    "Confidence intervals on stratigraphic ranges: partial relaxation of the assumption of randomly distributed fossil horizons",
  place: "Paleobiology 20:459-469",
};
export const solow1993Declining: Source = {
  authors: "Solow, A. R.",
  year: 1993,
  title: "Inferring extinction in a declining population",
  place: "Journal of Mathematical Biology 32:79-82",
};
export const cooke1980: Source = {
  authors: "Cooke, P.",
  year: 1980,
  title: "Optimal linear estimation of bounds of random variables",
  place: "Biometrika 67:257-258",
  doi: "10.1093/biomet/67.1.257",
};
export const hall1982: Source = {
  authors: "Hall, P.",
  year: 1982,
  title: "On estimating the endpoint of a distribution",
  place: "Annals of Statistics 10:556-568",
};
export const robertsSolow2003: Source = {
  authors: "Roberts, D. L. & Solow, A. R.",
  year: 2003,
  title: "When did the dodo become extinct?",
  place: "Nature 426:245",
  doi: "10.1038/426245a",
};
export const wang2016: Source = {
  authors: "Wang, S. C., Everson, P. J., Zhou, H. J., Park, D. & Chudzicki, D. J.",
  year: 2016,
  title: "Adaptive credible intervals on stratigraphic ranges when recovery potential is unknown",
  place: "Paleobiology 42:240-256",
};
export const mcInerny2006: Source = {
  authors: "McInerny, G. J., Roberts, D. L., Davy, A. J. & Cribb, P. J.",
  year: 2006,
  title: "Significance of sighting rate in inferring extinction and threat",
  place: "Conservation Biology 20:562-567",
  doi: "10.1111/j.1523-1739.2006.00377.x",
};
export const robsonWhitlock1964: Source = {
  authors: "Robson, D. S. & Whitlock, J. H.",
  year: 1964,
  title: "Estimation of a truncation point",
  place: "Biometrika 51:33-39",
  doi: "10.1093/biomet/51.1-2.33",
};
export const solow2003: Source = {
  authors: "Solow, A. R.",
  year: 2003,
  title: "Estimation of stratigraphic ranges when fossil finds are not randomly distributed",
  place: "Paleobiology 29:181-185",
};
export const chenLiu: Source = {
  authors: "Chen, S. X. & Liu, J. S.",
  year: 1997,
  title: "Statistical applications of the Poisson-binomial and conditional Bernoulli distributions",
  place: "Statistica Sinica 7:875-892",
};
export const mosimann1962: Source = {
  authors: "Mosimann, J. E.",
  year: 1962,
  title:
    "On the compound multinomial distribution, the multivariate beta-distribution, and correlations among proportions",
  place: "Biometrika 49:65-82",
};
