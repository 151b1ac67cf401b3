import type { Basis, Source } from "../basis.ts";

const coxLewis1966: Source = {
  authors: "Cox, D. R. & Lewis, P. A. W.",
  year: 1966,
  title: "The Statistical Analysis of Series of Events",
  place: "Methuen, London",
};
const marsaglia2003: Source = {
  authors: "Marsaglia, G., Tsang, W. W. & Wang, J.",
  year: 2003,
  title: "Evaluating Kolmogorov's distribution",
  place: "Journal of Statistical Software 8(18)",
  doi: "10.18637/jss.v008.i18",
};
const kendall1938: Source = {
  authors: "Kendall, M. G.",
  year: 1938,
  title: "A new measure of rank correlation",
  place: "Biometrika 30:81-93",
  doi: "10.1093/biomet/30.1-2.81",
};
const wald1940: Source = {
  authors: "Wald, A. & Wolfowitz, J.",
  year: 1940,
  title: "On a test whether two samples are from the same population",
  place: "Annals of Mathematical Statistics 11:147-162",
  doi: "10.1214/aoms/1177731909",
};
const fisher1929: Source = {
  authors: "Fisher, R. A.",
  year: 1929,
  title: "Tests of significance in harmonic analysis",
  place: "Proceedings of the Royal Society A 125:54-59",
  doi: "10.1098/rspa.1929.0151",
};
const fisher1932: Source = {
  authors: "Fisher, R. A.",
  year: 1932,
  title: "Statistical Methods for Research Workers, 4th edition",
  place: "Oliver & Boyd, Edinburgh",
};
const holland1995: Source = {
  authors: "Holland, S. M.",
  year: 1995,
  title: "The stratigraphic distribution of fossils",
  place: "Paleobiology 21:92-109",
};
const hollandPatzkowsky2015: Source = {
  authors: "Holland, S. M. & Patzkowsky, M. E.",
  year: 2015,
  title: "The stratigraphy of mass extinction",
  place: "Palaeontology 58:903-924",
  doi: "10.1111/pala.12188",
};

const davidNagaraja2003: Source = {
  authors: "David, H. A. & Nagaraja, H. N.",
  year: 2003,
  title: "Order Statistics, 3rd edition",
  place: "Wiley, Hoboken",
  doi: "10.1002/0471722162",
};

const givenEnds =
  "Given its first and last find, a taxon's other finds are independent and uniform between them.";
const lowPower = "Low power with few finds: a large p is no evidence of constant recovery.";
const fisherOverTaxa = "Taxa are combined by Fisher's method, which is cautious where p is discrete.";

/** Pre-checks: is recovery constant, do last finds cluster at surfaces, are highest finds isolated? */
export const checkBasis: readonly Basis[] = [
  {
    method: "centroid",
    statement:
      "Mean place of the finds between each taxon's first and last, pooled over taxa; exact one-sided p for finds concentrated low, that is recovery declining upward. Beside it the least decline (1 - x)^mu that these taxa would show with 80% power.",
    assumptions: [givenEnds, lowPower],
    sources: [coxLewis1966],
    after: true,
  },
  {
    method: "distance",
    statement:
      "Exact Kolmogorov-Smirnov test that finds are uniform between each taxon's first and last, pooled over taxa.",
    assumptions: [givenEnds, lowPower],
    sources: [marsaglia2003],
    after: true,
  },
  {
    method: "gap-trend",
    statement:
      "Kendall's tau of gap length against order: do gaps lengthen upward? Exact, equal gaps included.",
    assumptions: [
      "Given its first and last find, a taxon's gaps are exchangeable.",
      lowPower,
      fisherOverTaxa,
    ],
    sources: [kendall1938, fisher1932],
    after: true,
  },
  {
    method: "runs",
    statement: "Runs of gaps above and below their median: few runs mean dense and sparse stretches. Exact.",
    assumptions: [
      "Given its first and last find, a taxon's gaps are exchangeable.",
      lowPower,
      fisherOverTaxa,
    ],
    sources: [wald1940, fisher1932],
    after: true,
  },
  {
    method: "largest-gap",
    statement: "Is the longest gap of a taxon longer than uniform finds allow? Exact.",
    assumptions: [givenEnds, lowPower, fisherOverTaxa],
    sources: [fisher1929, fisher1932],
    after: true,
  },
  {
    method: "binomial",
    statement:
      "Number of last finds in windows below surfaces against the windows' share of a declared zone, as if last finds were independent.",
    assumptions: [
      "The zone and the windows were declared before the last finds were seen.",
      "Last finds are independent and uniform over the zone, in the recovery-weighted coordinate.",
    ],
    sources: [holland1995, hollandPatzkowsky2015],
    after: true,
  },
  {
    method: "shift",
    statement:
      "The same number against what it would be with all surfaces slid together along the zone, taken as a ring; exact.",
    assumptions: [
      "The zone and the windows were declared before the last finds were seen.",
      "Last finds lie anywhere on the zone in relation to the surfaces; they may cluster among themselves.",
    ],
    sources: [holland1995, hollandPatzkowsky2015],
    after: true,
  },
  {
    method: "highest-find",
    statement:
      "Is a taxon's highest find out of keeping with those below it, as a reworked or leaked one would be? Exact; judged at 1 - C^(1/k) for k taxa.",
    assumptions: [
      givenEnds,
      "An isolated find may be real: nothing is taken out for it, and the answers stand with and without.",
    ],
    sources: [davidNagaraja2003],
    after: true,
  },
];
