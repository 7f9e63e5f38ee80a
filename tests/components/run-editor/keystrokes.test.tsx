// @vitest-environment jsdom
/**
 * The run every new detailer is shown: NPS 4 STD, class 150 weld-neck contact face, 3'-1 1/2" east, 2'-8" up,
 * 1'-9 3/4" north, then 45° up-north 3'-0" to the center of a class 150 flanged gate valve; root gaps and gasket 1/8 in.
 * Cut lengths 28 1/4, 19 3/4, 13 and 25 5/8 in: hand checks from the tables (4 in weld-neck hub 3, LR take-out 6,
 * 45 take-out 2 1/2, gate valve half of 9).
 */
import { act, cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { writeDraft } from "@/components/run-editor/draft-store";
import { RunEditor } from "@/components/run-editor/run-editor";
import { lineDetail } from "./fixtures";

const MOST_KEYSTROKES = 120;

/** Types as a person does: one key at a time into whatever has the focus, counting each. */
class Keyboard {
  count = 0;

  private get field(): HTMLInputElement {
    const field = document.activeElement;
    if (!(field instanceof HTMLInputElement)) throw new Error("Nothing to type into has the focus.");
    return field;
  }

  press(key: string, held: { ctrlKey?: boolean; shiftKey?: boolean; altKey?: boolean } = {}): void {
    this.count += 1;
    const field = this.field;
    const taken = !fireEvent.keyDown(field, { key, ...held });
    if (taken || key.length > 1) return;
    const [from, to] = [field.selectionStart ?? field.value.length, field.selectionEnd ?? field.value.length];
    const value = field.value.slice(0, from) + key + field.value.slice(to);
    fireEvent.change(field, { target: { value } });
    field.setSelectionRange(from + 1, from + 1);
  }

  type(text: string): void {
    for (const key of text) this.press(key);
  }
}

function cutLengths(): string[] {
  return [...document.querySelectorAll("[data-cut]")].map((cell) => cell.textContent ?? "");
}

/** What was sent to keep the line, in order. */
function saves(): readonly (readonly [unknown, RequestInit | undefined])[] {
  return vi.mocked(fetch).mock.calls.filter(([, request]) => request?.method === "PUT") as never;
}

function open(): void {
  render(<RunEditor line={lineDetail()} viewer={{ personId: "person-1", name: "R. Tanaka" }} onUploads={async () => undefined} />);
}

describe("typing a run by keyboard alone", () => {
  beforeEach(() => {
    localStorage.clear();
    vi.stubGlobal("fetch", vi.fn(async () => new Response(JSON.stringify({ version: 2, savedAt: "2026-03-02T10:00:00Z" }), { status: 200 })));
  });
  afterEach(() => {
    cleanup();
    vi.unstubAllGlobals();
  });

  it("takes at most 120 keystrokes and gives the four cut lengths", async () => {
    open();
    const keys = new Keyboard();
    keys.type("wn");
    keys.press("Enter");
    keys.type("e 3-1 1/2");
    keys.press("Enter");
    keys.type("u 2-8");
    keys.press("Enter");
    keys.type("n 1-9 3/4");
    keys.press("Enter");
    keys.type("un 3-0");
    keys.press("Tab");
    keys.type("gate");
    keys.press("Enter");
    expect(keys.count).toBeLessThanOrEqual(MOST_KEYSTROKES);
    await waitFor(() => expect(cutLengths()).toEqual(["28 1/4 in", "19 3/4 in", "13 in", "25 5/8 in"]));
    expect(screen.getByText(`3'-1 1/2" east`)).toBeTruthy();
    // The drawing comes after the cut lengths; pointing at a leg leads to its row.
    const legs = () => [...document.querySelectorAll('svg[role=img] g[data-ref^="leg:"], svg[role=img] g[data-ref^="piece:"]')];
    await waitFor(() => expect(legs().length).toBeGreaterThan(0), { timeout: 20_000 });
    const leg = legs()[0];
    if (!leg) throw new Error("No leg is drawn.");
    fireEvent.click(leg);
    expect(document.activeElement?.getAttribute("data-cell")).toBe("main|1|move");
    expect(document.querySelector('[role=row][aria-selected=true]')?.getAttribute("aria-rowindex")).toBe("3");
  });

  it("keeps a wrong entry with its sentence and lets Ctrl+Z take back one entry at a time", async () => {
    open();
    const keys = new Keyboard();
    keys.type("wn");
    keys.press("Enter");
    keys.type("e 3-1 1/3");
    keys.press("Enter");
    expect(screen.getByRole("alert").textContent).toMatch(/1\/3/);
    expect((document.activeElement as HTMLInputElement).value).toBe("e 3-1 1/3");
    keys.press("Escape");
    expect(screen.queryByRole("alert")).toBeNull();
    keys.type("e 3-0");
    keys.press("Enter");
    expect(screen.getByText(`3'-0" east`)).toBeTruthy();
    keys.press("ArrowUp");
    keys.type("x");
    keys.press("Enter");
    keys.press("Escape");
    keys.type("w 2-0");
    keys.press("Enter");
    expect(screen.getByText(`2'-0" west`)).toBeTruthy();
    keys.press("z", { ctrlKey: true });
    keys.press("z", { ctrlKey: true });
    await waitFor(() => expect(screen.queryByText(`3'-0" east`)).toBeNull());
    keys.press("y", { ctrlKey: true });
    expect(screen.getByText(`3'-0" east`)).toBeTruthy();
  });

  it("picks an item from the list with the arrows", () => {
    open();
    const keys = new Keyboard();
    keys.type("g");
    expect(screen.getByRole("listbox", { name: "Items" }).textContent).toContain("gate valve");
    keys.press("ArrowDown");
    keys.press("Enter");
    expect(screen.getByDisplayValue("gate")).toBeTruthy();
  });

  it("saves by itself after a quiet moment, with the version it started from", async () => {
    vi.useFakeTimers();
    open();
    const keys = new Keyboard();
    keys.type("wn");
    keys.press("Enter");
    await act(async () => vi.advanceTimersByTimeAsync(900));
    const [path, request] = saves()[0] ?? [];
    expect(path).toBe("/api/lines/line-1");
    expect(request?.method).toBe("PUT");
    expect(JSON.parse(String(request?.body))).toMatchObject({ version: 1, document: { number: "4-CW-101" } });
    expect(document.querySelector("[data-save]")?.getAttribute("data-save")).toBe("saved");
    vi.useRealTimers();
  });

  it("tells who saved in the meantime and sends nothing more", async () => {
    vi.useFakeTimers();
    vi.mocked(fetch).mockImplementation(async () => new Response(JSON.stringify({ message: "Saved by someone else.", code: "conflict", currentVersion: 4, by: "M. Okafor", at: "2026-03-02T10:00:00Z" }), { status: 409 }));
    open();
    const keys = new Keyboard();
    keys.type("wn");
    keys.press("Enter");
    await act(async () => vi.advanceTimersByTimeAsync(900));
    expect(screen.getByText(/M. Okafor saved this line at/)).toBeTruthy();
    expect(screen.getByRole("button", { name: "Keep mine as a copy" })).toBeTruthy();
    keys.type("e 1-0");
    keys.press("Enter");
    await act(async () => vi.advanceTimersByTimeAsync(5_000));
    expect(saves()).toHaveLength(1);
    vi.useRealTimers();
  });

  it("keeps unsent work in the browser and brings it back on opening", async () => {
    vi.useFakeTimers();
    vi.mocked(fetch).mockImplementation(async () => Promise.reject(new TypeError("offline")));
    open();
    const keys = new Keyboard();
    keys.type("wn");
    keys.press("Enter");
    await act(async () => vi.advanceTimersByTimeAsync(900));
    expect(screen.getByText(/Not saved: no connection/)).toBeTruthy();
    cleanup();
    await act(async () => open());
    expect(screen.getByText(/were not saved were kept in this browser/)).toBeTruthy();
    expect(screen.getByDisplayValue("wn")).toBeTruthy();
    vi.useRealTimers();
  });

  it("sends restored work with the version it started from, so that another's save is told and not overwritten", async () => {
    vi.useFakeTimers();
    writeDraft("line-1", "person-1", { document: { ...lineDetail().document, title: "Mine" }, version: 1, at: "2026-03-01T09:00:00Z" });
    render(<RunEditor line={lineDetail({ version: 5 })} viewer={{ personId: "person-1", name: "R. Tanaka" }} onUploads={async () => undefined} />);
    await act(async () => vi.advanceTimersByTimeAsync(900));
    expect(JSON.parse(String(saves()[0]?.[1]?.body))).toMatchObject({ version: 1, document: { title: "Mine" } });
    vi.useRealTimers();
  });

  it("offers no typing to those who only read", () => {
    render(<RunEditor line={lineDetail({ editable: false })} viewer={{ personId: "person-2", name: "I. Novak" }} onUploads={async () => undefined} />);
    expect(screen.getAllByRole("gridcell")[0]?.querySelector("input")?.readOnly).toBe(true);
    expect(screen.queryByRole("button", { name: "Undo" })).toBeNull();
  });
});
