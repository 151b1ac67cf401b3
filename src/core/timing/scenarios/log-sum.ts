import { exp, log } from "../../numeric/elementary.ts";

/** ln of a sum of terms given by their logarithms, added one by one. */
export interface LogSum {
  readonly add: (logTerm: number) => void;
  readonly log: () => number;
}

export function logSum(): LogSum {
  let largest = Number.NEGATIVE_INFINITY;
  let sum = 0;
  const add = (logTerm: number) => {
    if (logTerm <= largest) {
      if (logTerm > largest - 60) sum += exp(logTerm - largest);
    } else if (logTerm > largest) {
      sum = sum * exp(largest - logTerm) + 1;
      largest = logTerm;
    }
  };
  return { add, log: () => largest + log(sum) };
}
