import { useEffect, useRef } from "react";
import { useFetcher, useRevalidator } from "react-router";

const EVERY = 15_000;

/** Somebody is typing, or has typed something that is not sent yet. */
function handsBusy(): boolean {
  const at = document.activeElement;
  if (at instanceof HTMLElement && at.matches("input:not([type=hidden]), textarea, select")) return true;
  return [...document.querySelectorAll<HTMLInputElement | HTMLTextAreaElement>("main input, main textarea")].some(
    (field) => field.type !== "hidden" && field.value !== field.defaultValue,
  );
}

/**
 * Looks every 15 s, while the page is seen and on coming back to it, whether the board's answer has changed, and only then loads
 * the page's data again. `tag` is that of the answer which the page was drawn from: while it is the same, no board is sent.
 */
export function useBoardWatch(address: string, tag: string): void {
  const { revalidate } = useRevalidator();
  const { load, data, state } = useFetcher<{ unchanged?: true }>();
  const busy = useRef(false);
  busy.current = state !== "idle";
  useEffect(() => {
    const look = () => {
      if (document.visibilityState !== "visible" || busy.current || handsBusy()) return;
      void load(`${address}?since=${encodeURIComponent(tag)}`);
    };
    const timer = setInterval(look, EVERY);
    document.addEventListener("visibilitychange", look);
    window.addEventListener("focus", look);
    return () => {
      clearInterval(timer);
      document.removeEventListener("visibilitychange", look);
      window.removeEventListener("focus", look);
    };
  }, [address, tag, load]);
  useEffect(() => {
    if (data && !data.unchanged && !handsBusy()) void revalidate();
  }, [data, revalidate]);
}
