import { describe, expect, it, vi } from "vitest";
import { threeElbowWays } from "@/iso";
import { bestOf, type WaySearchNews, type WaySearchRequest } from "@/components/ways/way-messages";
import { WaySearch } from "@/components/ways/way-search";
import { searchAndTell } from "@/components/ways/ways-worker";
import { FIRST_SETTINGS, readKeepOut, readSettings, writeSettings } from "@/components/ways/ways-settings";
import { walkedEnds, question } from "../../iso/ways/cases";
import { seededRandom } from "../../oracle/random";

const INPUT = question(walkedEnds(seededRandom(3), [90, 45, 90], [8, 9, 10, 11]));

/** A worker that is fed by hand. */
class HeldWorker {
  static made: HeldWorker[] = [];
  onmessage: ((event: { data: WaySearchNews }) => void) | null = null;
  onerror: (() => void) | null = null;
  sent: WaySearchRequest[] = [];
  ended = false;
  constructor() {
    HeldWorker.made.push(this);
  }
  postMessage(request: WaySearchRequest): void {
    this.sent.push(request);
  }
  terminate(): void {
    this.ended = true;
  }
  say(news: Omit<WaySearchNews, "id">): void {
    this.onmessage?.({ data: { id: this.sent[0]!.id, ...news } });
  }
}

function search(worker: boolean) {
  HeldWorker.made = [];
  const heard: WaySearchNews[] = [];
  const here = vi.fn((request: WaySearchRequest, tell: (news: WaySearchNews) => void) => tell({ id: request.id, done: 1, total: 1, ways: [], found: 0, finished: true }));
  const one = new WaySearch({ start: () => (worker ? (new HeldWorker() as unknown as Worker) : null), here, report: (news) => heard.push(news) });
  return { one, heard, here };
}

const part = { done: 2, total: 8, ways: [], found: 4, finished: false };

describe("the search of three elbows beside the page", () => {
  it("tells progress with what it has, and at the end what the search itself gives", () => {
    const heard: WaySearchNews[] = [];
    let clock = 0;
    searchAndTell({ id: 7, input: INPUT }, (news) => heard.push(news), () => (clock += 100));
    expect(heard.length).toBeGreaterThan(2);
    expect(heard.map((news) => news.done)).toEqual([...heard.map((news) => news.done)].sort((a, b) => a - b));
    const last = heard[heard.length - 1]!;
    const whole = threeElbowWays(INPUT).ways;
    expect(last).toMatchObject({ id: 7, done: 8, total: 8, finished: true, found: whole.length });
    expect(last.ways).toEqual(bestOf(whole));
    expect(heard.slice(0, -1).every((news) => !news.finished)).toBe(true);
  });

  it("ends the worker on cancel and passes on nothing that comes late", () => {
    const { one, heard } = search(true);
    one.ask(INPUT);
    const [worker] = HeldWorker.made;
    worker!.say(part);
    expect(heard).toHaveLength(1);
    one.cancel();
    expect(worker!.ended).toBe(true);
    worker!.say({ ...part, finished: true });
    expect(heard).toHaveLength(1);
  });

  it("gives up the old question for a new one, and lets the worker go when done", () => {
    const { one, heard } = search(true);
    one.ask(INPUT);
    one.ask({ ...INPUT, angles: [90] });
    const [first, second] = HeldWorker.made;
    expect(first!.ended).toBe(true);
    first!.say(part);
    expect(heard).toHaveLength(0);
    second!.say({ ...part, finished: true });
    expect(heard).toHaveLength(1);
    expect(second!.ended).toBe(true);
  });

  it("searches on the page where the worker is refused or there is none", async () => {
    const refused = search(true);
    refused.one.ask(INPUT);
    HeldWorker.made[0]!.onerror?.();
    await vi.waitFor(() => expect(refused.heard).toHaveLength(1));
    const without = search(false);
    without.one.ask(INPUT);
    without.one.cancel();
    without.one.ask(INPUT);
    await vi.waitFor(() => expect(without.heard).toHaveLength(1));
    expect(without.here).toHaveBeenCalledTimes(1);
  });
});

describe("what the shop has", () => {
  it("is remembered, and a spoiled or forbidden store does no harm", () => {
    const kept = new Map<string, string>();
    const store = { getItem: (key: string) => kept.get(key) ?? null, setItem: (key: string, text: string) => void kept.set(key, text) };
    expect(readSettings(store)).toEqual(FIRST_SETTINGS);
    const own = { ...FIRST_SETTINGS, angles: [90, 60, 45] as (90 | 60 | 45)[], preference: "shortest" as const };
    writeSettings(store, own);
    expect(readSettings(store)).toEqual(own);
    kept.set("quarterline.ways", `{"angles":[17]}`);
    expect(readSettings(store)).toEqual(FIRST_SETTINGS);
    expect(readSettings({ getItem: () => { throw new Error("forbidden"); } })).toEqual(FIRST_SETTINGS);
    expect(() => writeSettings({ setItem: () => { throw new Error("full"); } }, own)).not.toThrow();
  });

  it("reads spaces to keep clear of, or says per field what to type", () => {
    expect(readKeepOut({ kind: "below", name: "floor", a: "-1-0", b: "", clear: "2" }, "imperial", 1)).toEqual({
      ok: true, keepOut: { kind: "plane", name: "floor", clearMm: 50.8, point: [0, 0, -304.8], normal: [0, 0, 1] },
    });
    expect(readKeepOut({ kind: "east", name: "", a: "3-0", b: "", clear: "" }, "imperial", 2)).toMatchObject({ keepOut: { name: "keep-out 2", point: [914.4, 0, 0], normal: [-1, 0, 0] } });
    expect(readKeepOut({ kind: "box", name: "beam", a: "0, 0, 0", b: "100, 200, 300", clear: "" }, "metric", 1)).toMatchObject({ keepOut: { low: [0, 0, 0], high: [100, 200, 300] } });
    const wrong = readKeepOut({ kind: "sphere", name: "", a: "1, 2", b: "x", clear: "-1" }, "imperial", 1);
    expect(wrong).toMatchObject({ ok: false, messages: { a: expect.stringContaining("commas"), b: expect.any(String), clear: expect.stringContaining("under zero") } });
  });
});
