// Where to go after signing in. Only a path of this site: anything that a browser could read as another site becomes the default.

/** `path` when it is an absolute path of this site, else `fallback`. Source: OWASP ASVS 5.0.0, 3.7.2 (no open redirect). */
export function returnPath(path: string | null | undefined, fallback = "/hangar"): string {
  // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is refused; browsers drop some of them from an address
  if (!path || !/^\/(?![/\\])/.test(path) || /[\\\u0000-\u001f\u007f]/.test(path)) return fallback;
  const base = "http://here.invalid";
  try {
    const url = new URL(path, base);
    // "/.//elsewhere" becomes "//elsewhere", which a browser reads as another site.
    const here = url.origin === base && !url.pathname.startsWith("//");
    return here ? url.pathname + url.search + url.hash : fallback;
  } catch {
    return fallback;
  }
}
