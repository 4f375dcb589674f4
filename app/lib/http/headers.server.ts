// Headers that every answer of the server carries. Names and values: OWASP ASVS 5.0.0 chapter 3.4, OWASP Secure Headers Project.

const nothing =
  "accelerometer=(), camera=(self), display-capture=(), geolocation=(), gyroscope=(), magnetometer=(), microphone=(), midi=(), payment=(), usb=()";

/**
 * Content-Security-Policy of a page. Scripts and style elements run by nonce only. Style *attributes* are allowed: the
 * schematic places its parts by them, React writes them, and no text that a person typed ever reaches one.
 */
export function contentSecurityPolicy(nonce: string, options: { development: boolean; https: boolean }): string {
  const dev = options.development;
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}'`,
    // The development server injects its style elements without a nonce; a nonce in the list would switch 'unsafe-inline' off.
    dev ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`,
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    dev ? "connect-src 'self' ws:" : "connect-src 'self'",
    "worker-src 'self'",
    "manifest-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
    ...(options.https ? ["upgrade-insecure-requests"] : []),
  ].join("; ");
}

/** Sets what is missing of the security headers; a route that set a stricter policy for its file keeps it. */
export function setSecurityHeaders(headers: Headers, nonce: string, options: { development: boolean; https: boolean }): void {
  const standing: Record<string, string> = {
    "Content-Security-Policy": contentSecurityPolicy(nonce, options),
    "X-Content-Type-Options": "nosniff",
    // Not "no-referrer": browsers then send `Origin: null` with a form, and the origin check would refuse it.
    "Referrer-Policy": "same-origin",
    "Permissions-Policy": nothing,
    "Cross-Origin-Opener-Policy": "same-origin",
    "Cross-Origin-Resource-Policy": "same-origin",
    "X-Frame-Options": "DENY",
    // Pages and data belong to one person; only hashed assets are kept, and those do not pass here.
    "Cache-Control": "no-store",
  };
  if (options.https) standing["Strict-Transport-Security"] = "max-age=63072000; includeSubDomains";
  for (const [name, value] of Object.entries(standing)) if (!headers.has(name)) headers.set(name, value);
}
