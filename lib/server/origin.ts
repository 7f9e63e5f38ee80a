/** Which requests may change something: only those a page of ours sent. */

const SAFE_METHODS = new Set(["GET", "HEAD", "OPTIONS"]);

/** Whether a method only reads. */
export function isSafeMethod(method: string): boolean {
  return SAFE_METHODS.has(method.toUpperCase());
}

/**
 * Whether a writing request's Origin header is the one the shop's pages are served from. Browsers send it with every
 * write; a request without it did not come from one of our pages. Malformed addresses answer no.
 */
export function isOwnOrigin(origin: string | null, baseUrl: string): boolean {
  if (origin === null || !URL.canParse(origin) || !URL.canParse(baseUrl)) return false;
  return new URL(origin).origin === new URL(baseUrl).origin && new URL(origin).origin !== "null";
}
