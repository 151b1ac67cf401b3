import type { ReactElement } from "react";
import { Button, Dialog, DialogTrigger, Heading, Popover } from "react-aria-components";
import styles from "./tool-menu.module.css";

/** Every key of the grid, as a person reads them. */
const KEYS: readonly (readonly [keys: string, act: string])[] = [
  ["Arrows, Tab", "the next cell; with Shift and arrows a block"],
  ["Ctrl + arrows", "the edge of what is filled"],
  ["Home, End", "the row's ends; with Ctrl the table's"],
  ["Page Up, Page Down", "a screenful"],
  ["↑ in the first row", "the names of the columns"],
  ["Enter, F2, typing", "write in the cell"],
  ["Enter, Shift + Enter", "done, and down or up"],
  ["Tab, Shift + Tab", "done, and to the right or left"],
  ["Alt + Enter", "a new line in the cell"],
  ["Escape", "give up; then Tab leaves the table"],
  ["Delete", "empty the cells"],
  ["Ctrl + D", "fill down"],
  ["Ctrl + C, X, V", "copy, cut, paste a block"],
  ["Ctrl + A", "all cells"],
  ["Ctrl + Z, Ctrl + Y", "undo, redo"],
  ["Alt + ↑, Alt + ↓", "a new row above, below"],
  ["Ctrl + F, F3", "find, find the next; with Shift the one before"],
  ["l", "the section log"],
];

/** The keys of the grid, on asking. */
export function GridKeys(): ReactElement {
  return (
    <DialogTrigger>
      <Button className={styles.button}>Keys</Button>
      <Popover placement="bottom end">
        <Dialog className={styles.keys}>
          <Heading slot="title">Keys in the table</Heading>
          <dl>
            {KEYS.map(([keys, act]) => (
              <div key={keys} style={{ display: "contents" }}>
                <dt>{keys}</dt>
                <dd>{act}</dd>
              </div>
            ))}
          </dl>
        </Dialog>
      </Popover>
    </DialogTrigger>
  );
}
