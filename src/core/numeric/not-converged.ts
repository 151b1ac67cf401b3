/** An iteration that ran out of steps before it came to rest. */
export class NotConverged extends Error {
  override readonly name = "NotConverged";

  constructor(where: string, iterations: number) {
    super(`${where}: expected convergence within ${iterations} iterations, got none`);
  }
}
