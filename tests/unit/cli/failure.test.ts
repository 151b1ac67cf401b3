import { describe, expect, it } from "vitest";
import { CallError } from "../../../src/cli/call-error.ts";
import { failureOf } from "../../../src/cli/failure.ts";

describe("a failure", () => {
  it("of the call is exit 2 in its own words", () => {
    expect(failureOf(new CallError("lastbed: expected this, got that"))).toEqual({
      message: "lastbed: expected this, got that",
      exitCode: 2,
    });
  });

  it("of the system names what could not be done and why, and is exit 2", () => {
    const error = Object.assign(new Error("ENOSPC: no space left on device, write"), {
      code: "ENOSPC",
      syscall: "open",
      path: "/out/timing.csv",
    });
    expect(failureOf(error)).toEqual({
      message: "lastbed: expected to be able to open /out/timing.csv, got ENOSPC: the disk is full",
      exitCode: 2,
    });
  });

  it("of the program is exit 1, without a stack", () => {
    const { message, exitCode } = failureOf(new RangeError("betaFraction: no convergence\n    at here"));
    expect(exitCode).toBe(1);
    expect(message).toContain("betaFraction: no convergence");
    expect(message).not.toContain("at here");
  });
});
