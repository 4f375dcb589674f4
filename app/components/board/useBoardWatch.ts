import { useEffect, useRef } from "react";
import { useRevalidator } from "react-router";

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
 * the page's data again. The address answers "not changed" without a body for the tag that the page was drawn from.
 */
export function useBoardWatch(address: string, tag: string): void {
  const { revalidate, state } = useRevalidator();
  const loading = useRef(false);
  loading.current = state === "loading";
  useEffect(() => {
    const stop = new AbortController();
    const look = async () => {
      if (document.visibilityState !== "visible" || loading.current || handsBusy()) return;
      try {
        const answer = await fetch(address, { headers: { "If-None-Match": tag }, cache: "no-store", signal: stop.signal });
        if (answer.status === 401 || (answer.ok && answer.headers.get("ETag") !== tag)) await revalidate();
      } catch {
        // No network: the page stays as it was, and says as of when.
      }
    };
    const timer = setInterval(look, EVERY);
    document.addEventListener("visibilitychange", look);
    window.addEventListener("focus", look);
    return () => {
      stop.abort();
      clearInterval(timer);
      document.removeEventListener("visibilitychange", look);
      window.removeEventListener("focus", look);
    };
  }, [address, tag, revalidate]);
}
