const GROUP = "group:";

export const isGroupSet = (set: string): boolean => set.startsWith(GROUP);

/** A set's name as a person reads it. */
export function setTitle(set: string): string {
  if (set === "candidates") return "Candidates";
  if (set === "candidates-closed") return "Candidates, without those that reach the top";
  return isGroupSet(set) ? `Group: ${set.slice(GROUP.length)}` : set;
}
