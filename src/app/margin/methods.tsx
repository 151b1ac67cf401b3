import type { ReactElement } from "react";
import type { Basis, Source } from "../../core/basis.ts";
import styles from "./margin.module.css";

/** Each method in a sentence; what it assumes and where it comes from open beneath it. */
export function Methods({ methods }: { readonly methods: readonly Basis[] }): ReactElement | null {
  if (methods.length === 0) return null;
  return (
    <section className={styles.part}>
      <h2>Method and sources</h2>
      {methods.map(({ method, statement, assumptions, sources, after }) => (
        <details key={method} className={styles.method}>
          <summary>{statement}</summary>
          {assumptions.length > 0 && (
            <ul>
              {assumptions.map((assumption) => (
                <li key={assumption}>{assumption}</li>
              ))}
            </ul>
          )}
          {sources.map((source) => (
            <p key={`${source.authors} ${source.title}`}>
              {after && "After "}
              <SourceWords {...source} />
            </p>
          ))}
        </details>
      ))}
    </section>
  );
}

function SourceWords({ authors, year, title, place, doi }: Source): ReactElement {
  return (
    <>
      {authors} ({year}). {title}. {place}.{doi && ` doi:${doi}`}
    </>
  );
}
