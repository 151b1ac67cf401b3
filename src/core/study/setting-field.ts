import * as v from "valibot";
import { settingSchema } from "./setting-path.ts";

/** How one setting is asked for: its kind, its words, and its values where they are a list. */
export interface SettingField {
  readonly kind: "number" | "choice" | "text" | "parts";
  readonly words?: string;
  readonly options?: readonly string[];
}

/** Undefined where there is no such setting. */
export function settingField(path: string): SettingField | undefined {
  const found = settingSchema(path);
  if (found === undefined) return undefined;
  const { inner } = found;
  const words = wordsOf(path);
  const options = optionsOf(inner);
  const kind =
    options !== undefined
      ? "choice"
      : inner.type === "number"
        ? "number"
        : inner.type === "string"
          ? "text"
          : "parts";
  return { kind, ...(words === undefined ? {} : { words }), ...(options === undefined ? {} : { options }) };
}

/** Its own words, or those of the part that it belongs to. */
function wordsOf(path: string): string | undefined {
  const found = settingSchema(path);
  if (found === undefined) return undefined;
  const own = v.getDescription(found.schema) ?? v.getDescription(found.inner);
  const end = path.lastIndexOf(".");
  return own ?? (end < 0 ? undefined : wordsOf(path.slice(0, end)));
}

function optionsOf(schema: v.GenericSchema): readonly string[] | undefined {
  if (!("options" in schema) || !Array.isArray(schema.options)) return undefined;
  return schema.options.filter((option) => typeof option === "string");
}
