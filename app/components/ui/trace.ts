import { createContext, useContext, useSyncExternalStore } from "react";

/** The number under which the server logged this page's request. */
export const TraceContext = createContext("");

const never = () => () => {};

function lastFailure(): string | undefined {
  return /(?:^|;\s*)trace=([0-9a-z]+)/.exec(document.cookie)?.[1];
}

/** The number to tell when something failed: that of the last failed request, else the page's own. */
export function useTrace(): string {
  const page = useContext(TraceContext);
  return useSyncExternalStore(
    never,
    () => lastFailure() ?? page,
    () => page,
  );
}
