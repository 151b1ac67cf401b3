import { type SettingChange, withChanges } from "../../core/study/changed-settings.ts";
import { baseName } from "../../core/tables/base-name.ts";
import type { GivenStudy } from "./given-study.ts";

export const SETTINGS_FILE = "settings.json";

/** The study with one setting changed in its settings.json. */
export function withSetting(given: GivenStudy, change: SettingChange): GivenStudy {
  return { ...given, files: withSettings(given.files, [change]), isSettled: true };
}

/** The files with settings changed in settings.json, which is made where there is none. */
export function withSettings(
  files: ReadonlyMap<string, Uint8Array>,
  changes: readonly SettingChange[],
): ReadonlyMap<string, Uint8Array> {
  if (changes.length === 0) return files;
  const [file, bytes] = [...files].find(([path]) => baseName(path).toLowerCase() === SETTINGS_FILE) ?? [
    SETTINGS_FILE,
  ];
  const changed = withChanges(bytes === undefined ? {} : parsed(bytes), changes);
  const text = `${JSON.stringify(changed, null, 2)}\n`;
  return new Map([...files, [file, new TextEncoder().encode(text)]]);
}

/** Settings that cannot be read are told as a problem and begin anew. */
function parsed(bytes: Uint8Array): unknown {
  try {
    const value: unknown = JSON.parse(new TextDecoder().decode(bytes));
    return value;
  } catch {
    return {};
  }
}
