import { useSyncExternalStore } from "react";

const never = () => () => {};

/** Whether the page runs in the browser: what only works there is drawn then, and never by the server. */
export const useLive = (): boolean =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
