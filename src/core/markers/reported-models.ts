import { exp } from "../numeric/elementary.ts";
import type { ComparedModel, MixingFit } from "./mixing-fit.ts";
import type { MixingCell } from "./mixing-likelihood.ts";
import type { MixingModel } from "./result.ts";

const centimetresPerMetre = 100;
/** Points of the drawn curve, in mixing lengths above the base of the smear. */
const curvePoints = Array.from({ length: 41 }, (_, i) => i / 6);

/**
 * The compared models in metres, for tables and figures. F, B and positions of M2 are the refitted ones; likelihood,
 * AICc and weight are of the first pass, whose errors all models share.
 */
export function reportedModels(
  fit: MixingFit,
  { cells, datumM }: { cells: readonly MixingCell[]; datumM: number },
): readonly MixingModel[] {
  const height = (cm: number) => datumM + cm / centimetresPerMetre;
  const layer = cells[fit.m1.at];
  const middle = height((layer.baseCm + layer.topCm) / 2);
  const { baseCm, lengthCm, fluence, background } = fit.reported;
  return [
    { id: "M0", ...comparison(fit.m0), background: fit.m0.background },
    {
      id: "M1",
      ...comparison(fit.m1),
      fluence: fit.m1.fluence,
      background: fit.m1.background,
      baseM: height(layer.baseCm),
      surfaceM: { value: middle, low: height(layer.baseCm), high: height(layer.topCm) },
    },
    {
      id: "M2",
      ...comparison(fit.m2),
      fluence,
      background,
      baseM: height(baseCm),
      lengthM: {
        value: lengthCm / centimetresPerMetre,
        low: fit.length.isOpenLow ? 0 : fit.length.low / centimetresPerMetre,
        high: fit.length.high / centimetresPerMetre,
      },
      surfaceM: {
        value: height(baseCm + lengthCm),
        low: height(fit.surface.low),
        high: height(fit.surface.high),
      },
      baseInterval: { value: height(baseCm), low: height(fit.base.low), high: height(fit.base.high) },
      curve: boxCurve(fit, cells, height),
    },
  ];
}

function comparison({ logLikelihood, parameters, aicc, weight }: ComparedModel) {
  return {
    logLikelihood,
    parameters,
    ...(aicc === undefined ? {} : { aicc }),
    ...(weight === undefined ? {} : { weight }),
  };
}

function boxCurve(fit: MixingFit, cells: readonly MixingCell[], height: (cm: number) => number) {
  const { baseCm, lengthCm, fluence, background } = fit.reported;
  const within = cells.filter((cell) => cell.topCm >= baseCm && cell.baseCm <= baseCm + 3 * lengthCm);
  const used = within.length > 0 ? within : cells;
  const density = used.reduce((sum, cell) => sum + cell.density, 0) / used.length;
  const [bottom, top] = [cells[0].baseCm, cells[cells.length - 1].topCm];
  const smear = curvePoints.filter((x) => baseCm + x * lengthCm <= top);
  return {
    heightsM: [bottom, baseCm, ...smear.map((x) => baseCm + x * lengthCm)].map(height),
    values: [
      background,
      background,
      ...smear.map((x) => background + (fluence / (density * lengthCm)) * exp(-x)),
    ],
  };
}
