/** Searches three elbows beside the page and tells how far it is. Stopped by ending the worker. */
import { threeElbowWays, type Way } from "@/iso";
import { bestOf, type WaySearchNews, type WaySearchRequest } from "./way-messages";

/** Least time between two words of news, ms: more would only keep the page busy. */
const NEWS_EVERY_MS = 150;

/** One search; news goes out through `tell`. The clock is handed in. */
export function searchAndTell({ id, input }: WaySearchRequest, tell: (news: WaySearchNews) => void, now: () => number): void {
  let ways: readonly Way[] = [];
  let told = now();
  let last = { done: 0, total: 1 };
  const tick = (done: number, total: number): boolean => {
    last = { done, total };
    if (now() - told >= NEWS_EVERY_MS && done < total) {
      told = now();
      tell({ id, done, total, ways: bestOf(ways), found: ways.length, finished: false });
    }
    return false;
  };
  const result = threeElbowWays(input, tick, (more) => {
    ways = [...ways, ...more];
  });
  tell({ id, done: last.total, total: last.total, ways: bestOf(result.ways), found: result.ways.length, finished: true });
}

if (typeof self !== "undefined" && typeof document === "undefined") {
  self.onmessage = ({ data }: MessageEvent<WaySearchRequest>) => searchAndTell(data, (news) => self.postMessage(news), () => performance.now());
}
