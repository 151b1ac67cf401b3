import type { ReactElement } from "react";
import type { Words } from "../../report/wordings/words.ts";

/** A sentence with what is stressed, and the names of taxa in italics. */
export function WordsText({ words }: { readonly words: Words }): ReactElement {
  return (
    <>
      {words.map((span, place) => {
        if (typeof span === "string") return span;
        const key = `${place}`;
        return "strong" in span ? <strong key={key}>{span.strong}</strong> : <i key={key}>{span.name}</i>;
      })}
    </>
  );
}
