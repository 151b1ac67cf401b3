import { note } from "../ranges/range-case.ts";
import { commonEndTest, informative } from "./common-end.ts";
import type { TimingAnswer } from "./result.ts";
import { separation } from "./separation.ts";
import { commonFields, type SetCase } from "./set-case.ts";
import { allCandidates, earlyStep, lateStep } from "./sets.ts";
import { stepsOf } from "./steps.ts";

/** `two-steps`: how far apart did two declared groups end? Asked of the candidates, once groups are declared. */
export function stepsAnswers(setCase: SetCase): TimingAnswer[] {
  const { set, settings, coordinate, confidence } = setCase;
  if (set.set !== allCandidates) return [];
  const steps = stepsOf(set.ranges, settings);
  const taxa = steps === undefined ? 0 : informative([...steps.early, ...steps.late]).length;
  const fields = {
    ...commonFields(setCase, taxa),
    question: "two-steps",
    method: "separation",
    level: confidence,
    unit: "m",
  } as const;
  if (steps === undefined) return [{ ...fields, outcome: "not-applicable", note: howToDeclare }];
  const apart = separation(steps, coordinate, confidence);
  if (apart === undefined)
    return [{ ...fields, outcome: "undefined", note: "a step has no taxon with an informative range here" }];
  const { lowM, highM } = apart;
  return [
    {
      ...fields,
      ...(lowM === undefined ? {} : { low: lowM }),
      ...(highM === undefined ? {} : { high: highM }),
      outcome: lowM === undefined || highM === undefined ? "open" : "closed",
      note: note(
        `later minus earlier: ${steps.late.length} taxa against ${steps.early.length}`,
        levelWords(setCase, steps),
      ),
    },
  ];
}

const howToDeclare =
  "declare timing.steps.early and timing.steps.late, taxa or group:<name>, before looking at last finds";

/** The interval holds for groups that each ended at one level. */
function levelWords({ confidence }: SetCase, steps: NonNullable<ReturnType<typeof stepsOf>>) {
  const rejected = (["early", "late"] as const).filter((step) => {
    const p = commonEndTest(steps[step])?.p;
    return p !== undefined && p <= 1 - confidence;
  });
  return rejected.length === 0
    ? undefined
    : `one level is rejected within ${rejected.map((step) => (step === "early" ? earlyStep : lateStep)).join(" and ")}`;
}
