import type { ReactElement } from "react";
import {
  Autocomplete,
  Collection,
  Dialog,
  Header,
  Input,
  Menu,
  MenuItem,
  MenuSection,
  Modal,
  ModalOverlay,
  SearchField,
  useFilter,
} from "react-aria-components";
import type { Action } from "../state/actions.ts";
import { usePage } from "../state/page-context.ts";
import styles from "./go-to.module.css";

/** Everything a person can do now, found by typing a part of its name. */
export function GoTo({ actions }: { readonly actions: readonly Action[] }): ReactElement {
  const { state, dispatch } = usePage();
  const { contains } = useFilter({ sensitivity: "base" });
  const turn = (isOpen: boolean) => dispatch({ kind: "go-to-turned", isOpen });
  const available = actions.filter(({ isAvailable }) => isAvailable);
  const groups = [...new Set(available.map(({ group }) => group))];
  return (
    <ModalOverlay className={styles.veil} isOpen={state.isGoToOpen} onOpenChange={turn} isDismissable>
      <Modal className={styles.modal}>
        <Dialog className={styles.dialog} aria-label="Go to">
          <Autocomplete filter={contains}>
            {/* oxlint-disable-next-line jsx-a11y/no-autofocus -- a person who asks for this list is about to type */}
            <SearchField className={styles.field} aria-label="Go to" autoFocus>
              <Input className={styles.input} placeholder="Go to a station, section, set…" />
            </SearchField>
            <Menu
              className={styles.list}
              aria-label="What can be done now"
              renderEmptyState={() => <p className={styles.none}>Nothing here is called that.</p>}
              onAction={(key) => {
                turn(false);
                available.find(({ id }) => id === key)?.act();
              }}
            >
              {groups.map((group) => (
                <MenuSection key={group} id={group}>
                  <Header className={styles.group}>{group}</Header>
                  <Collection items={available.filter((action) => action.group === group)}>
                    {({ id, label, shortcut }) => (
                      <MenuItem id={id} className={styles.item} textValue={`${label} ${group}`}>
                        <span>{label}</span>
                        {shortcut && <kbd>{shortcut}</kbd>}
                      </MenuItem>
                    )}
                  </Collection>
                </MenuSection>
              ))}
            </Menu>
          </Autocomplete>
        </Dialog>
      </Modal>
    </ModalOverlay>
  );
}
