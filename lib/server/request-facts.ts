/** What a request says about where it comes from. */

const ADDRESS_MAX = 64;

/**
 * Address of the sender as the nearest proxy saw it: the last one in X-Forwarded-For, since the ones before it are
 * whatever the sender wrote. Used for counting tries only.
 */
export function addressOf(headers: Headers): string {
  const chain = (headers.get("x-forwarded-for") ?? "").split(",").map((part) => part.trim());
  return (chain[chain.length - 1] || "unknown").slice(0, ADDRESS_MAX);
}

const BROWSERS = [["Edg/", "Edge"], ["OPR/", "Opera"], ["Firefox/", "Firefox"], ["Chrome/", "Chrome"], ["Safari/", "Safari"]] as const;
const SYSTEMS = [["iPhone", "iPhone"], ["iPad", "iPad"], ["Android", "Android"], ["Windows", "Windows"], ["Mac OS", "Mac"], ["Linux", "Linux"]] as const;

/** A short name of the device for the list of sessions: "Firefox on Windows". */
export function deviceOf(headers: Headers): string {
  const agent = headers.get("user-agent") ?? "";
  const browser = BROWSERS.find(([sign]) => agent.includes(sign))?.[1] ?? "A browser";
  const system = SYSTEMS.find(([sign]) => agent.includes(sign))?.[1];
  return system === undefined ? browser : `${browser} on ${system}`;
}
