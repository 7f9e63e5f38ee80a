/** The security headers of every answer. Pure: what they are for a nonce and an address, nothing else. */

/** Headers that do not depend on the request. */
export const STEADY_HEADERS: Readonly<Record<string, string>> = {
  "x-content-type-options": "nosniff",
  "x-frame-options": "SAMEORIGIN",
  "referrer-policy": "same-origin",
  "cross-origin-opener-policy": "same-origin",
  "cross-origin-resource-policy": "same-origin",
  "permissions-policy": "camera=(), microphone=(), geolocation=(), payment=(), usb=(), browsing-topics=()",
};

/** Two years, as browsers' preload lists ask for. */
const HTTPS_ONLY = "max-age=63072000";

/**
 * The policy of a page: scripts and style sheets of our own that carry the request's nonce, nothing from elsewhere.
 * Style attributes are allowed: server-rendered markup places things with them, and they cannot run anything.
 */
export function pagePolicy(nonce: string, secure: boolean, development: boolean): string {
  const rules = [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ""}`,
    development ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`,
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' blob: data:",
    "font-src 'self'",
    "connect-src 'self'",
    "frame-src 'self' blob:",
    "frame-ancestors 'self'",
    "worker-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'self'",
    "form-action 'self'",
  ];
  return [...rules, ...(secure ? ["upgrade-insecure-requests"] : [])].join("; ");
}

/** The policy of data and files: they run nothing. Browsers show PDFs in a viewer of their own, which this lets be. */
export const DATA_POLICY = "script-src 'none'; frame-ancestors 'self'; base-uri 'none'; form-action 'none'";

/** The headers for one answer, policy included. */
export function securityHeaders(policy: string, secure: boolean): Record<string, string> {
  return {
    ...STEADY_HEADERS,
    "content-security-policy": policy,
    ...(secure ? { "strict-transport-security": HTTPS_ONLY } : {}),
  };
}
