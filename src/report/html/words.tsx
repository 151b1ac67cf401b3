import type { ReactElement } from "react";
import type { Words } from "../wordings/words.ts";

/** A sentence with its stresses and its taxon names. */
export function Sentence({ words }: { readonly words: Words }): ReactElement {
  return (
    <>
      {words.map((span, i) => {
        const key = `${i}`;
        if (typeof span === "string") return <span key={key}>{span}</span>;
        return "strong" in span ? <strong key={key}>{span.strong}</strong> : <i key={key}>{span.name}</i>;
      })}
    </>
  );
}
