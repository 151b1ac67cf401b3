import { useEffect, useState } from "react";

/** Whether this tab holds a study's kept work, or another tab does; undefined until that is known. */
export function useHold(key: string | undefined): "held" | "elsewhere" | undefined {
  const [hold, setHold] = useState<{ readonly key: string; readonly is: "held" | "elsewhere" }>();
  useEffect(() => {
    if (key === undefined) return undefined;
    let release = () => {};
    let isOver = false;
    void navigator.locks.request(`lastbed ${key}`, { ifAvailable: true }, (lock) => {
      if (isOver) return undefined;
      setHold({ key, is: lock === null ? "elsewhere" : "held" });
      return lock === null ? undefined : new Promise<void>((resolve) => (release = resolve));
    });
    return () => {
      isOver = true;
      release();
    };
  }, [key]);
  return hold?.key === key ? hold?.is : undefined;
}
