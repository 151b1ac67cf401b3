import { mergeSettings, withoutPath } from "../../core/study/setting-path.ts";
import { baseName } from "../../core/tables/base-name.ts";
import type { GivenStudy } from "./given-study.ts";

/** One setting by the names of its path; without a value it is taken out. */
export interface SettingChange {
  readonly path: readonly string[];
  readonly value?: string;
}

const FILE = "settings.json";

/** The study with one setting changed in its settings.json. */
export function withSetting(given: GivenStudy, { path, value }: SettingChange): GivenStudy {
  const [file, bytes] = [...given.files].find(([path]) => baseName(path).toLowerCase() === FILE) ?? [FILE];
  const raw = bytes === undefined ? {} : parsed(bytes);
  const nested = path.reduceRight<unknown>((inner, name) => ({ [name]: inner }), value);
  const changed = value === undefined ? (withoutPath(raw, path) ?? {}) : mergeSettings(raw, nested);
  const text = `${JSON.stringify(changed, null, 2)}\n`;
  const files = new Map([...given.files, [file, new TextEncoder().encode(text)]]);
  return { ...given, files, isSettled: true };
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
