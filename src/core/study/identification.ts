import type { FindReason } from "./finds-result.ts";
import type { Qualifier } from "./model.ts";

export type Identification = "strict" | "inclusive";

/** How a qualifier lets a find count: for the named species, as an operational taxon of its own, or not at all. */
type Treatment =
  | { readonly kind: "counts" }
  | { readonly kind: "own-taxon" }
  | { readonly kind: "set-aside"; readonly reason: FindReason };

const counts: Treatment = { kind: "counts" };
const ownTaxon: Treatment = { kind: "own-taxon" };
const setAside = (reason: FindReason): Treatment => ({ kind: "set-aside", reason });

/**
 * Treatment of open nomenclature. The codes are silent on what the signs mean, so this is the documented default:
 * cf. and ? count only when names are read inclusively, aff. never, species groups and broad or narrow senses stand
 * for themselves.
 *
 * Source: signs after Bengtson 1988, Palaeontology 31:223-227; Sigovini et al. 2016, doi:10.1111/2041-210X.12594.
 */
export function treatmentOf(qualifier: Qualifier | undefined, identification: Identification): Treatment {
  switch (qualifier) {
    case undefined:
      return counts;
    case "cf.":
    case "?":
      return identification === "inclusive" ? counts : setAside("qualifier");
    case "aff.":
      return setAside("affinity");
    case "? genus":
      return setAside("genus-doubtful");
    case "sp.":
    case "spp.":
    case "indet.":
      return setAside("not-to-species");
    case "ex gr.":
    case "sp. nov.":
    case "s.l.":
    case "s.s.":
      return ownTaxon;
    default:
      return qualifier satisfies never;
  }
}
