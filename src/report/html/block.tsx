import type { ReactElement } from "react";
import type { Drawing } from "../../figures/index.ts";
import type { Finding } from "../findings/finding.ts";
import { FindingBlock } from "./finding-block.tsx";

interface BlockProps {
  readonly findings: readonly Finding[];
  readonly drawings?: readonly Drawing[];
}

/** Findings, and under them the plates they speak of. */
export function Block({ findings, drawings = [] }: BlockProps): ReactElement {
  return (
    <>
      {findings.map((finding, i) => (
        <FindingBlock key={`${i}`} finding={finding} />
      ))}
      {drawings.map((drawing) => (
        <figure key={drawing.id}>
          {drawing.element}
          <figcaption>
            <strong>{drawing.title}.</strong> {drawing.description}
          </figcaption>
        </figure>
      ))}
    </>
  );
}
