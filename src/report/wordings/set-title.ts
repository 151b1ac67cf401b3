const GROUP = "group:";

export const isGroupSet = (set: string): boolean => set.startsWith(GROUP);

/** A set's name as a person reads it. */
export function setTitle(set: string): string {
  if (set === "candidates") return "Candidates";
  if (set === "candidates-closed") return "Candidates, without those that reach the top";
  if (set === "candidates-without-isolated") return "Candidates, without isolated highest finds";
  if (set === "candidates-untrimmed") return "Candidates, with finds below the reworking ceiling";
  if (set === "step:early") return "Declared earlier step";
  if (set === "step:late") return "Declared later step";
  return isGroupSet(set) ? `Group: ${set.slice(GROUP.length)}` : set;
}
