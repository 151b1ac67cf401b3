import type { LocalTaxon } from "../study/finds-result.ts";
import type { Study } from "../study/model.ts";
import type { Boundary } from "../study/roles.ts";
import { byFluence } from "./main-horizon.ts";
import type { Markers, Mixing } from "./result.ts";
import { reworkingCeiling } from "./reworking.ts";

/**
 * What taxa of one section are judged against: the main horizon there, and the smear of the layer found beside it
 * where mixing is accepted. Undefined where the section has no H.
 */
export function boundaryIn(section: string, markers: Markers, study: Study): Boundary | undefined {
  const main = markers.main.bySection.get(section);
  if (main === undefined) return undefined;
  const mixing =
    main.mixing ??
    markers.horizons
      .filter((h) => h.section === section && h.horizon === main.horizon && h.mixing !== undefined)
      .toSorted(byFluence)[0]?.mixing;
  const base = { positionM: main.positionM, highM: main.highM };
  if (mixing === undefined) return { ...base, ceilingOf: () => undefined };
  return {
    ...base,
    smearBaseM: mixing.baseM,
    ceilingOf: (taxon) => ceilingOf(taxon, mixing, study),
  };
}

/**
 * Large shells are mixed less: `mixing_length_m` of taxa.csv stands in for the layer's own mixing length, and 0 says
 * that they are not mixed at all.
 */
function ceilingOf(taxon: LocalTaxon, mixing: Mixing, study: Study): number | undefined {
  const surfaceM = mixing.baseM + mixing.lengthM;
  const lengthM = study.taxa.get(taxon.taxon)?.mixingLengthM ?? mixing.lengthM;
  if (lengthM === 0) return undefined;
  const ceiling = reworkingCeiling({ heightsM: taxon.heightsM, baseM: surfaceM - lengthM, lengthM });
  return ceiling.kind === "ceiling" ? ceiling.heightM : undefined;
}
