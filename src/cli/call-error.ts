/** The call itself is wrong: exit 2. */
export class CallError extends Error {
  override readonly name = "CallError";
}
