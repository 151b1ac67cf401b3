import type { ReactElement } from "react";
import { Button, Menu, MenuItem, MenuTrigger, Popover, Text } from "react-aria-components";
import styles from "./tool-menu.module.css";

export interface Tool {
  readonly title: string;
  /** What it does beyond its title, or the keys that do it. */
  readonly help?: string;
  readonly isDisabled?: boolean;
  readonly act: () => void;
}

interface ToolMenuProps {
  readonly title: string;
  readonly tools: readonly Tool[];
}

/** Tools of one kind behind one button. */
export function ToolMenu({ title, tools }: ToolMenuProps): ReactElement {
  return (
    <MenuTrigger>
      <Button className={styles.button}>{title}</Button>
      <Popover placement="bottom start">
        <Menu
          className={styles.menu}
          aria-label={title}
          disabledKeys={tools.flatMap((tool) => (tool.isDisabled ? [tool.title] : []))}
        >
          {tools.map(({ title, help, act }) => (
            <MenuItem key={title} id={title} className={styles.item} textValue={title} onAction={act}>
              <Text slot="label">{title}</Text>
              {help !== undefined && <small>{help}</small>}
            </MenuItem>
          ))}
        </Menu>
      </Popover>
    </MenuTrigger>
  );
}
