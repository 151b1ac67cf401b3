export const errorKinds = ["1s", "2s", "1s%", "2s%", "95%", "se"] as const;
export type ErrorKind = (typeof errorKinds)[number];

/** Half-width of the central 95% of a normal distribution in standard deviations, Phi^-1(0.975). */
const ninetyFive = 1.959963984540054;

/**
 * One standard deviation of a value whose uncertainty was given as one or two standard deviations (absolute, or percent
 * of the value's size), a 95% half-width of a normal distribution, or a standard error. In the unit of `error` or, for
 * the percent kinds, of `value`.
 */
export function oneSigma(error: number, kind: ErrorKind, value: number): number {
  switch (kind) {
    case "1s":
    case "se":
      return error;
    case "2s":
      return error / 2;
    case "1s%":
      return (error * Math.abs(value)) / 100;
    case "2s%":
      return (error * Math.abs(value)) / 200;
    case "95%":
      return error / ninetyFive;
    default:
      return kind satisfies never;
  }
}
