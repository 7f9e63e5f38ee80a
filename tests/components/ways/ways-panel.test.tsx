// @vitest-environment jsdom
import { act, cleanup, fireEvent, render, screen, waitFor, within } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { buildModel, emptyMarks, threeElbowWays, type Way, type WaysInput } from "@/iso";
import { WaysPanel, type WaysAsked } from "@/components/ways/ways-panel";
import { bestOf, type WaySearchNews, type WaySearchRequest } from "@/components/ways/way-messages";
import { emptyDocument } from "../run-editor/fixtures";
import "../browser";

const IN = 25.4;
const ASKED: WaysAsked = {
  end0: { position: [0, 0, 0], direction: [1, 0, 0], straightMm: 0 }, end1: { position: [48 * IN, 40 * IN, 30 * IN], direction: [0, -1, 0], straightMm: 0 },
  nps: "4", rootGapMm: IN / 8,
};
const MODEL = buildModel(emptyDocument(), emptyMarks(), []);

/** A worker fed by hand. */
class HeldWorker {
  static made: HeldWorker[] = [];
  onmessage: ((event: { data: WaySearchNews }) => void) | null = null;
  onerror: (() => void) | null = null;
  request: WaySearchRequest | null = null;
  ended = false;
  constructor() {
    HeldWorker.made.push(this);
  }
  postMessage(request: WaySearchRequest): void {
    this.request = request;
  }
  terminate(): void {
    this.ended = true;
  }
}

beforeEach(() => {
  HeldWorker.made = [];
  window.localStorage.clear();
  vi.stubGlobal("Worker", HeldWorker);
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(onInsert: ((way: Way, input: WaysInput) => void) | null, asked = ASKED, refusal: string | null = null) {
  const plan = () => (refusal === null ? { ok: true as const } : { ok: false as const, message: refusal });
  return render(<WaysPanel asked={asked} model={MODEL} takeOuts={[]} plan={plan} onInsert={onInsert} />);
}

const titles = () => screen.getAllByRole("heading", { level: 4 }).map((heading) => heading.textContent ?? "").filter((text) => /^\d+\. /.test(text));

async function started(): Promise<HeldWorker> {
  await waitFor(() => expect(HeldWorker.made[HeldWorker.made.length - 1]?.request).toBeTruthy());
  return HeldWorker.made[HeldWorker.made.length - 1]!;
}

describe("the ways under a closing", () => {
  it("shows at once what needs no search, each with its picture and numbers, and inserts the one pressed", () => {
    const onInsert = vi.fn();
    show(onInsert);
    expect(titles()[0]).toMatch(/^1\. LR /);
    const first = screen.getAllByRole("listitem").find((item) => within(item).queryByRole("img"))!;
    for (const fact of ["Welds", "Trimmed cuts", "Center line", "Weight, empty", "Pipe to cut", "Shortest pup", "Keep-out"]) expect(within(first).getByText(fact)).toBeTruthy();
    expect(within(first).getByText(/1\/16 in off at an end/)).toBeTruthy();
    fireEvent.click(screen.getByRole("button", { name: /^Insert way 2, / }));
    expect(onInsert).toHaveBeenCalledTimes(1);
    expect(titles()[1]).toContain((onInsert.mock.calls[0]![0] as Way).title);
  });

  it("says how far the search of three elbows is, lists what it brings, and stops it by a press", async () => {
    show(vi.fn());
    const worker = await started();
    const ways = bestOf(threeElbowWays(worker.request!.input).ways);
    expect(ways.length).toBeGreaterThan(0);
    act(() => worker.onmessage?.({ data: { id: worker.request!.id, done: 3, total: 8, ways, found: ways.length, finished: false } }));
    await waitFor(() => expect(screen.getByText(`3 of 8 rows of elbows, ${ways.length} ways so far`)).toBeTruthy());
    fireEvent.click(screen.getByRole("button", { name: "Shortest" }));
    fireEvent.click(screen.getByRole("button", { name: "Cancel the search" }));
    expect(worker.ended).toBe(true);
    expect(screen.getByRole("status").textContent).toContain(`stopped. ${ways.length} found until then stand in the list`);
    expect(screen.getAllByText("three whole elbows").length).toBeGreaterThan(0);
    fireEvent.click(screen.getByRole("button", { name: "Search again" }));
    expect(HeldWorker.made[HeldWorker.made.length - 1]!.ended).toBe(false);
  });

  it("remembers the shop's elbows and order, and asks again with them", async () => {
    show(vi.fn());
    await started();
    fireEvent.click(screen.getByLabelText("60°"));
    fireEvent.click(screen.getByRole("button", { name: "Fewest welds" }));
    await waitFor(() => expect(HeldWorker.made[HeldWorker.made.length - 1]?.request?.input.angles).toEqual([90, 45, 60]));
    cleanup();
    show(vi.fn());
    expect((screen.getByLabelText<HTMLInputElement>("60°")).checked).toBe(true);
    expect(screen.getByRole("button", { name: "Fewest welds" }).getAttribute("aria-pressed")).toBe("true");
  });

  it("says why a way cannot go in, gives a reader no button, and names what is wrong with the ends", () => {
    show(vi.fn(), ASKED, "Take end 0 from a row of the run; the closing goes in after it.");
    expect(screen.getByRole<HTMLButtonElement>("button", { name: /^Insert way 1, / }).disabled).toBe(true);
    expect(screen.getAllByText(/Take end 0 from a row/).length).toBeGreaterThan(0);
    cleanup();
    show(null);
    expect(screen.queryByRole("button", { name: /^Insert way/ })).toBeNull();
    cleanup();
    show(vi.fn(), { ...ASKED, end1: { ...ASKED.end1, position: [0, 0, 0] } });
    expect(screen.getByText(/Both ends stand at the same place/)).toBeTruthy();
  });

  it("keeps clear of what is named, and says why nothing closes", async () => {
    show(vi.fn(), { ...ASKED, end1: { position: [5 * IN, 3 * IN, 0], direction: [-1, 0, 0], straightMm: 0 } });
    expect(screen.getByRole("heading", { name: "What does not close, and why" })).toBeTruthy();
    expect(screen.getByText("Two whole elbows")).toBeTruthy();
    cleanup();
    show(vi.fn());
    fireEvent.click(screen.getByRole("button", { name: "Add a space to keep clear of" }));
    fireEvent.change(screen.getByLabelText("Level"), { target: { value: "-0-1" } });
    await waitFor(() => expect(screen.getAllByText(/too near keep-out 1/).length).toBeGreaterThan(0));
  });
});
