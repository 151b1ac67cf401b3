import type { Basis } from "../basis.ts";
import { log10 } from "../numeric/elementary.ts";
import { studentUpperTail } from "../numeric/student.ts";
import { type BackgroundFit, type Concentration, ln10 } from "./background.ts";

export interface AnomalyTest {
  /** Undefined for a cell below detection: it cannot show an excess. */
  readonly t?: number;
  readonly p: number;
}

/** Efficiency of the scaled MAD: it carries the information of about 0.37 n squared deviations. */
const madEfficiency = 0.37;
/** Small-sample correction of the scaled MAD, n/(n - 0.8). */
const madCorrection = 0.8;
const fewestDegrees = 2;

export const anomalyBasis: Basis = {
  method: "anomaly-test",
  statement:
    "Each sample is compared with the background on the log scale: one-sided Student t with the background's own error and the sample's measurement error; samples are flagged by Benjamini and Hochberg at q = 0.05, and a run of adjacent flagged samples is one anomaly.",
  assumptions: [
    "background samples are independent and lognormal",
    "the scatter of the background includes the measurement error of its samples",
  ],
  sources: [
    {
      authors: "Benjamini, Y., Hochberg, Y.",
      year: 1995,
      title: "Controlling the false discovery rate: a practical and powerful approach to multiple testing",
      place: "Journal of the Royal Statistical Society B 57:289-300",
      doi: "10.1111/j.2517-6161.1995.tb02031.x",
    },
  ],
  after: true,
};

/**
 * One-sided test of each sample against the background.
 *
 *     t_i = (lg C_i - m) / sqrt( s_c^2 (1 + pi/(2 n_b)) + (sigma_i/(C_i ln10))^2 ),  p_i = P(T_df > t_i)
 *
 * `s_c = s n_b/(n_b - 0.8)`, `df = max(2, 0.37 (n_b - 1))`. Where m and s come from the censored likelihood
 * `s_c = s`, the factor is `1 + 1/n_b` and df the measured values kept - 1 (at least 2). Cells below detection have
 * p = 1. `sigma` (unit of C) is the measurement error; leave it 0 where the background's scatter already holds it.
 */
export function anomalyTest(
  samples: readonly (Concentration & { readonly sigma: number })[],
  { logMedian, logSd, kept, censoredKept, isLikelihood }: BackgroundFit,
): readonly AnomalyTest[] {
  const scale = isLikelihood ? logSd : (logSd * kept) / (kept - madCorrection);
  const factor = isLikelihood ? 1 + 1 / kept : 1 + Math.PI / (2 * kept);
  const degrees = isLikelihood ? kept - censoredKept - 1 : madEfficiency * (kept - 1);
  const df = Math.max(fewestDegrees, degrees);
  return samples.map(({ value, censored, sigma }) => {
    if (censored === "left") return { p: 1 };
    const measured = sigma / (value * ln10);
    const t = (log10(value) - logMedian) / Math.sqrt(scale * scale * factor + measured * measured);
    return { t, p: studentUpperTail(t, df) };
  });
}
