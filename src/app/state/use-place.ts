import { type Dispatch, useCallback, useEffect, useRef } from "react";
import type { PageEvent } from "./page-state.ts";
import { hashOf, type Place, placeOf } from "./place.ts";

/** Keeps the place and the page's address the same, so that the way back is the browser's own. */
export function usePlace(place: Place, dispatch: Dispatch<PageEvent>): (change: Partial<Place>) => void {
  const latest = useRef(place);
  useEffect(() => {
    const follow = () => {
      latest.current = placeOf(location.hash);
      dispatch({ kind: "placed", place: latest.current });
    };
    addEventListener("hashchange", follow);
    return () => removeEventListener("hashchange", follow);
  }, [dispatch]);

  return useCallback((change) => {
    location.hash = hashOf({ ...latest.current, ...change });
    latest.current = { ...latest.current, ...change };
  }, []);
}
