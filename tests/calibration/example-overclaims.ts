import type { Told } from "./example-variants.ts";

const differs = (number: string | undefined, truly: number) =>
  Math.abs(Number(number ?? Number.NaN) - truly) > 0.006;

/** What a sentence may never do, whatever the truth: say more than the numbers beside it. */
export function overclaims({ sentence, weights, lead, horizonWeights, isDistrusted, codes }: Told): string[] {
  const faults: string[] = [];
  const fault = (is: boolean, what: string) => is && faults.push(`${what}: ${sentence}`);
  const said = (pattern: RegExp) => sentence.match(pattern)?.slice(1);
  fault(/sudden|simultaneous|extinct/i.test(sentence), "more than ends");
  const weight = said(/ha(?:s|ve) (?:over|under)?\W*([\d.]+) of the weight/);
  fault(weight !== undefined && differs(weight[0], weights.get(lead) ?? 0), "another weight");
  fault(weight !== undefined && (weights.get(lead) ?? 0) <= 0.5, "a leader without half of the weight");
  const [horizon, share] = said(/most of it at ([\w-]+) \((?:over|under)?\W*([\d.]+)\)/) ?? [];
  fault(horizon !== undefined && differs(share, horizonWeights.get(horizon) ?? 0), "another share");
  fault(
    horizon !== undefined && (horizonWeights.get(horizon) ?? 0) <= 0.5,
    "a marker without half of the weight",
  );
  const held = sentence.includes("of the weight") && lead === "one-level";
  fault(
    held && codes.includes("scenario-horizon-favoured") && !sentence.includes("not excluded"),
    "one level flatly",
  );
  fault(isDistrusted && !/thin out upward|too few/.test(sentence), "no word of the decline");
  fault(!isDistrusted && sentence.includes("thin out upward"), "a decline that is not");
  fault(
    codes.includes("timing-aligned-too-well") && /If they ended together/.test(sentence),
    "a place not to be trusted",
  );
  return faults;
}
