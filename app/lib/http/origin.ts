// Writes come from our own pages. The framework's own check lets a missing Origin pass and leaves out resource routes
// (measured on React Router 7.18), so every write is checked here, before any route sees it.

const reading = new Set(["GET", "HEAD", "OPTIONS"]);

/**
 * Null when a request may write, else the sentence that refuses it. A request with a bearer token is exempt, because
 * nothing but our own client puts one there; such a request never counts as signed in by cookie.
 * Source: OWASP ASVS 5.0.0, 3.5.1 and 3.5.3.
 */
export function refuseForeignWrite(request: { method: string; url: string; headers: Headers }): string | null {
  if (reading.has(request.method.toUpperCase()) || hasBearerToken(request.headers)) return null;
  const origin = request.headers.get("Origin");
  if (origin === new URL(request.url).origin) return null;
  return origin
    ? "This request came from another site, so nothing was changed. Open the page here and send it again."
    : "This request does not say which page it came from, so nothing was changed. Send it from the page itself.";
}

export const hasBearerToken = (headers: Headers): boolean => /^Bearer\s/i.test(headers.get("Authorization") ?? "");
