import type { ReactElement } from "react";
import { usePage } from "../state/page-context.ts";
import { canWriteFolders } from "../study/folder.ts";
import { giveOutFolder, giveOutStudy, giveOutTable, giveOutWorkbook } from "../study/give-out.ts";
import type { ReadOut } from "../study/read-out.ts";
import type { History } from "./history.ts";
import { ToolMenu } from "./tool-menu.tsx";

interface SaveMenuProps {
  /** The table's file. */
  readonly file: string;
  readonly tell: (words: string) => void;
}

/** The ways to get the tables out as they are now. */
export function SaveMenu({ file, tell }: SaveMenuProps): ReactElement {
  const { study, state } = usePage();
  const save = (give: (study: ReadOut, history: History) => Promise<string>) => () => {
    if (study.readOut === undefined) return;
    give(study.readOut, state.history).then(tell, (error: unknown) =>
      tell(error instanceof Error ? error.message : String(error)),
    );
  };
  const folder = {
    title: "Study as a folder",
    help: "the same files, in a new folder",
    act: save(giveOutFolder),
  };
  return (
    <ToolMenu
      title="Save…"
      tools={[
        {
          title: "This table as CSV",
          help: "its cells, nothing added",
          act: save((study, history) => giveOutTable(study, history, file)),
        },
        {
          title: "Study as a zip",
          help: "tables, settings and what was set aside",
          act: save(giveOutStudy),
        },
        ...(canWriteFolders() ? [folder] : []),
        { title: "Tables as a workbook", help: "a sheet for each table", act: save(giveOutWorkbook) },
      ]}
    />
  );
}
