import type { Settings } from "../settings.ts";

/** The one name that the settings give to a horizon of a section, by both their names as JSON. */
export const declaredHorizons = ({ boundary }: Settings): ReadonlyMap<string, string> =>
  new Map(
    boundary.same.flatMap(({ name, horizons }) =>
      horizons.map((member) => [JSON.stringify(member), name] as const),
    ),
  );
