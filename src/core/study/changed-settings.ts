import * as v from "valibot";
import { mergeSettings, withoutPath } from "./setting-path.ts";
import { type Settings, settingsSchema } from "./settings.ts";

/** One setting by the names of its path; without a value it is taken out, so that its default stands. */
export interface SettingChange {
  readonly path: readonly string[];
  readonly value?: unknown;
}

/** Raw settings with some changed; a list or a part that is given anew takes the whole place of the old one. */
export function withChanges(raw: unknown, changes: readonly SettingChange[]): unknown {
  return changes.reduce<unknown>((changed, { path, value }) => {
    const without = withoutPath(changed, path) ?? {};
    if (value === undefined) return without;
    return mergeSettings(
      without,
      path.reduceRight<unknown>((inner, name) => ({ [name]: inner }), value),
    );
  }, raw);
}

export type ChangedSettings =
  | { readonly kind: "changed"; readonly settings: Settings }
  | { readonly kind: "refused"; readonly reason: string };

/** The settings of a study with some changed, or why they cannot be. */
export function changedSettings(settings: Settings, changes: readonly SettingChange[]): ChangedSettings {
  const read = v.safeParse(settingsSchema, withChanges(settings, changes));
  if (read.success) return { kind: "changed", settings: read.output };
  const [{ message, path = [] }] = read.issues;
  return { kind: "refused", reason: `${path.map(({ key }) => String(key)).join(".")}: ${message}` };
}
