import { type ReactElement, useState } from "react";
import marginStyles from "../margin/margin.module.css";
import { usePage } from "../state/page-context.ts";
import tableStyles from "../tables/tables.module.css";
import { dateWords } from "./date-words.ts";
import styles from "./kept-part.module.css";

/** What is kept in this browser: the open study's edits and snapshots, and other studies. */
export function KeptPart(): ReactElement {
  const { keeping } = usePage();
  const others = keeping.names.filter(({ key }) => key !== keeping.key);
  return (
    <section className={marginStyles.part}>
      <h2>Kept</h2>
      <p>{keptWords(keeping)}</p>
      {keeping.key !== undefined && <SnapshotForm />}
      <ul className={tableStyles.problems}>
        {keeping.snapshots.map((snapshot) => (
          <li key={snapshot.id} className={styles.kept}>
            <span>
              <b>{snapshot.name}</b> {dateWords(snapshot.at)}
            </span>
            <button type="button" onClick={() => keeping.goBackTo(snapshot)}>
              Go back to this
            </button>
            <button
              type="button"
              aria-label={`Forget ${snapshot.name}`}
              onClick={() => keeping.removeSnapshot(snapshot)}
            >
              Forget
            </button>
          </li>
        ))}
        {others.map((kept) => (
          <li key={kept.key} className={styles.kept}>
            <span>
              <b>{kept.name}</b>, another study, {dateWords(kept.at)}
            </span>
            <button type="button" onClick={() => keeping.open(kept)}>
              Open
            </button>
            <button type="button" aria-label={`Forget ${kept.name}`} onClick={() => keeping.forget(kept)}>
              Forget
            </button>
          </li>
        ))}
      </ul>
    </section>
  );
}

function keptWords({ key, hold, at }: ReturnType<typeof usePage>["keeping"]): string {
  if (key === undefined) return "Nothing can be kept at this address: give the edited tables out as files.";
  if (hold === "elsewhere") return "Edits made in this tab are not kept: another tab holds this study.";
  const only = "in this browser only: cleared with its data, and on no other machine";
  return at === undefined
    ? `Edits will be kept as they are made, ${only}.`
    : `Edits up to ${dateWords(at)} are kept ${only}.`;
}

function SnapshotForm(): ReactElement {
  const { keeping } = usePage();
  const [name, setName] = useState("");
  return (
    <form
      className={styles.form}
      onSubmit={(event) => {
        event.preventDefault();
        keeping.takeSnapshot(name.trim());
        setName("");
      }}
    >
      <label>
        Name these tables{" "}
        <input
          required
          pattern=".*\S.*"
          value={name}
          onChange={(event) => setName(event.currentTarget.value)}
        />
      </label>
      <button type="submit">Keep</button>
    </form>
  );
}
