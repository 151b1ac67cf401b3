import { suggestName } from "../nearest.ts";
import { plainForm } from "./similar-names.ts";

/** What an unknown name may be meant to be: the nearest known one, and the only one that it is but for its form. */
export interface MeantName {
  readonly nearest?: string;
  readonly now?: string;
}

/** Looking for the nearest name costs time for each known name, so it ends after so many unknown ones. */
const mostSought = 100;

/** Finds what unknown names are meant to be, each once. */
export function meantNames(known: Iterable<string>): (written: string) => MeantName {
  const names = [...known];
  const found = new Map<string, MeantName>();
  let byForm: ReadonlyMap<string, string | undefined> | undefined;
  return (written) => {
    const earlier = found.get(written);
    if (earlier !== undefined) return earlier;
    byForm ??= formsOf(names);
    const now = byForm.get(plainForm(written));
    const nearest = now ?? (found.size < mostSought ? suggestName(written, names) : undefined);
    const meant = {
      ...(nearest === undefined ? {} : { nearest }),
      ...(now === undefined ? {} : { now }),
    };
    found.set(written, meant);
    return meant;
  };
}

/** Names by their form; undefined where two share it. */
function formsOf(names: readonly string[]): ReadonlyMap<string, string | undefined> {
  const forms = new Map<string, string | undefined>();
  for (const name of names) {
    const form = plainForm(name);
    forms.set(form, forms.has(form) ? undefined : name);
  }
  return forms;
}
