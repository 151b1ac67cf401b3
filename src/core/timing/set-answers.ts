import { oneLevelAnswer, whereAnswers } from "./common-end-answers.ts";
import { durationAnswers } from "./duration-answers.ts";
import { horizonAnswers } from "./horizon-answers.ts";
import { isolatedAnswers } from "./isolated.ts";
import { pulsesAnswers } from "./pulses-answers.ts";
import { rarityAnswers } from "./rarity-answers.ts";
import { recoveryAnswers } from "./recovery-answers.ts";
import type { TimingAnswer } from "./result.ts";
import type { SetCase } from "./set-case.ts";
import { stepsAnswers } from "./steps-answers.ts";
import { surfaceAnswers } from "./surface-answers.ts";
import { halfIntervalsWhere, twoHighestWhere } from "./where-answers.ts";

/** Every question about one set of one section. */
export function answerSet(setCase: SetCase): TimingAnswer[] {
  return [
    oneLevelAnswer(setCase),
    ...whereAnswers(setCase),
    halfIntervalsWhere(setCase),
    ...twoHighestWhere(setCase),
    ...horizonAnswers(setCase),
    ...durationAnswers(setCase),
    ...stepsAnswers(setCase),
    ...pulsesAnswers(setCase),
    ...rarityAnswers(setCase),
    ...recoveryAnswers(setCase),
    ...surfaceAnswers(setCase),
    ...isolatedAnswers(setCase),
  ];
}
