import { useState } from "react";

/** Whether a person opened or closed a part of the page, for as long as this tab lives; undefined until they do. */
export function useTurned(name: string): readonly [boolean | undefined, (isOpen: boolean) => void] {
  const key = `lastbed-turned ${name}`;
  const [turned, setTurned] = useState<{ readonly key: string; readonly isOpen: boolean }>();
  const turn = (isOpen: boolean) => {
    setTurned({ key, isOpen });
    try {
      sessionStorage.setItem(key, isOpen ? "open" : "closed");
    } catch {
      // A browser that keeps nothing still turns it.
    }
  };
  return [turned?.key === key ? turned.isOpen : kept(key), turn];
}

function kept(key: string): boolean | undefined {
  try {
    const word = sessionStorage.getItem(key);
    return word === null ? undefined : word === "open";
  } catch {
    return undefined;
  }
}
