import { type ReactElement, useRef } from "react";
import { Button, Menu, MenuItem, MenuTrigger, Popover, Text } from "react-aria-components";
import { usePage } from "../state/page-context.ts";
import { bundledStudy } from "../study/bundled-study.ts";
import { chosenStudy } from "../study/dropped-study.ts";
import styles from "./header.module.css";

/** The ways to open a study other than dropping it. */
export function OpenStudyMenu(): ReactElement {
  const { study, dispatch } = usePage();
  const folder = useRef<HTMLInputElement>(null);
  const files = useRef<HTMLInputElement>(null);
  const take = (input: HTMLInputElement) => {
    const chosen = [...(input.files ?? [])];
    input.value = "";
    if (chosen.length > 0) study.open("the chosen study", () => chosenStudy(chosen));
  };
  return (
    <>
      <MenuTrigger>
        <Button className={styles.menuButton}>Open…</Button>
        <Popover placement="bottom end">
          <Menu className={styles.menu}>
            <Way title="A study folder" help="all its tables at once" act={() => folder.current?.click()} />
            <Way title="Tables" help="CSV files, a workbook or a zip" act={() => files.current?.click()} />
            <Way
              title="Paste a table…"
              help="from a spreadsheet, or Ctrl+V anywhere"
              act={() => dispatch({ kind: "pasted", text: "" })}
            />
            <Way
              title="The study beside this page"
              help="the one it opened with"
              act={() => study.open("the study beside this page", bundledStudy)}
            />
          </Menu>
        </Popover>
      </MenuTrigger>
      <input
        ref={folder}
        className={styles.hidden}
        type="file"
        data-testid="study-folder"
        aria-label="A study folder"
        webkitdirectory=""
        onChange={(event) => take(event.currentTarget)}
      />
      <input
        ref={files}
        className={styles.hidden}
        type="file"
        data-testid="study-files"
        aria-label="Tables of a study"
        multiple
        accept=".csv,.tsv,.tab,.json,.zip,.xlsx,text/csv,application/json"
        onChange={(event) => take(event.currentTarget)}
      />
    </>
  );
}

function Way({
  title,
  help,
  act,
}: {
  readonly title: string;
  readonly help: string;
  readonly act: () => void;
}) {
  return (
    <MenuItem className={styles.item} textValue={title} onAction={act}>
      <Text slot="label">{title}</Text>
      <small>{help}</small>
    </MenuItem>
  );
}
