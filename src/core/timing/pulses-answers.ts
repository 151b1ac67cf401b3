import { isUninformative } from "../ranges/pivot.ts";
import { metres, note } from "../ranges/range-case.ts";
import { type PulsesTest, pulsesBootstrap } from "./pulses-bootstrap.ts";
import type { TimingAnswer } from "./result.ts";
import { commonFields, type SetCase, simulationOf } from "./set-case.ts";

const MOST_PULSES = 4;

/** `how-many`: is one pulse enough, and, while it is not, two, three, four? One row for each count, in `part`. */
export function pulsesAnswers(setCase: SetCase): TimingAnswer[] {
  const { set, settings, confidence } = setCase;
  const ranges = set.ranges.filter((range) => !isUninformative(range));
  const answers: TimingAnswer[] = [];
  for (let pulses = 1; pulses <= MOST_PULSES; pulses++) {
    const test = pulsesBootstrap(ranges, pulses, simulationOf(settings));
    if (test === undefined && pulses > 1) break;
    answers.push(pulsesAnswer(setCase, pulses, { test, taxa: ranges.length }));
    if (test === undefined || test.p > 1 - confidence) break;
  }
  return answers;
}

interface Tested {
  readonly test: PulsesTest | undefined;
  readonly taxa: number;
}

function pulsesAnswer(setCase: SetCase, pulses: number, { test, taxa }: Tested): TimingAnswer {
  const fields = {
    ...commonFields(setCase, taxa),
    question: "how-many",
    method: "pulses-bootstrap",
    part: pulses,
  } as const;
  if (test === undefined)
    return { ...fields, outcome: "undefined", note: "fewer than two taxa with an informative range" };
  const heights = test.levels.flatMap((level) => setCase.coordinate.toHeight(level, "lower") ?? []);
  return {
    ...fields,
    testStatistic: test.statistic,
    p: test.p,
    mcError: test.mcError,
    outcome: "closed",
    note: note(
      `${pulses} against ${pulses + 1}: ${test.replicates} simulated assemblages`,
      pulses > 1 && `likeliest at ${heights.map(metres).join(", ")} or just above`,
    ),
  };
}
