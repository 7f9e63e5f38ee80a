// @vitest-environment jsdom
/** Editing a number on the drawing, a size the tables lack, and a browser without WebGL, as a person meets them. */
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { buildModel, emptyMarks } from "@/iso";
import { MeasuredTakeOut } from "@/components/run-editor/measured-take-out";
import { editorReducer, initialState } from "@/components/run-editor/editor-state";
import { RunEditor } from "@/components/run-editor/run-editor";
import { NO_WEBGL, ShapeView } from "@/components/run-editor/shape-view";
import { emptyDocument, lineDetail, testStamp } from "./fixtures";

function document20() {
  return editorReducer(initialState(emptyDocument(), testStamp()), { type: "paste", target: { runId: "main", row: 0, column: "move" }, text: "0\twn\ne 3-1 1/2\t\nu 2-8\tend\n", stamp: testStamp() }).document;
}

beforeEach(() => {
  localStorage.clear();
  vi.stubGlobal("fetch", vi.fn(async () => new Response(JSON.stringify([]), { status: 200 })));
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const cell = (row: number): HTMLInputElement => window.document.querySelector<HTMLInputElement>(`[data-cell="main|${row}|move"]`)!;

describe("a number pressed on the drawing", () => {
  async function pressed(): Promise<HTMLInputElement> {
    const made = document20();
    render(<RunEditor line={lineDetail({ document: made })} viewer={{ personId: "p", name: "R. Tanaka" }} onUploads={async () => undefined} />);
    const number = await waitFor(() => {
      const found = window.document.querySelector(`text[data-ref="dimension:${made.runs[0]?.points[1]?.id}"]`);
      if (!found) throw new Error("The number is not drawn.");
      return found;
    }, { timeout: 20_000 });
    fireEvent.click(number);
    return screen.getByRole<HTMLInputElement>("textbox", { name: "Length to row 2" });
  }

  it("opens a field over it; Enter takes the new length into its row", async () => {
    const field = await pressed();
    expect(field.value).toBe("3-1 1/2");
    fireEvent.change(field, { target: { value: "4-0" } });
    fireEvent.keyDown(field, { key: "Enter" });
    expect(cell(1).value).toBe("e 4-0");
    expect(screen.queryByRole("textbox", { name: "Length to row 2" })).toBeNull();
  });

  it("says what to type, and Esc leaves the row as it was", async () => {
    const field = await pressed();
    fireEvent.change(field, { target: { value: "4 what" } });
    fireEvent.keyDown(field, { key: "Enter" });
    expect(screen.getByRole("alert").textContent).toMatch(/not a length|Type/);
    fireEvent.keyDown(field, { key: "Escape" });
    expect(cell(1).value).toBe("e 3-1 1/2");
  });

  it("is reached by keys alone: Enter on the drawing edits the current row's number", async () => {
    const field = await pressed();
    fireEvent.keyDown(field, { key: "Escape" });
    const drawing = screen.getByRole("img", { name: /^Isometric of line/ });
    fireEvent.keyDown(drawing, { key: "PageDown" });
    fireEvent.keyDown(drawing, { key: "Enter" });
    expect(screen.getByRole("textbox", { name: "Length to row 3" })).toBeTruthy();
  });
});

describe("a size the tables do not have", () => {
  const problem = { code: "take-out-missing", severity: "stop" as const, text: "The tables have no cap.", pointId: "p1", runId: "main", catalogueKey: "cap:24" };

  it("is entered there and then by the owner", async () => {
    const recorded = vi.fn(async () => undefined);
    render(<MeasuredTakeOut problems={[problem]} units="imperial" role="owner" onRecorded={recorded} />);
    fireEvent.change(screen.getByLabelText("What the shop measured"), { target: { value: "10 1/2" } });
    fireEvent.click(screen.getByRole("button", { name: "Use it" }));
    await waitFor(() => expect(recorded).toHaveBeenCalled());
    const sent = vi.mocked(fetch).mock.calls.find(([, request]) => request?.method === "POST");
    expect(JSON.parse(String(sent?.[1]?.body))).toEqual({ key: "cap:24", valueMm: 266.7 });
  });

  it("names who may when it is somebody else's to enter", async () => {
    vi.mocked(fetch).mockImplementation(async () => new Response(JSON.stringify([{ role: "owner", name: "Ruth Alvarado" }]), { status: 200 }));
    render(<MeasuredTakeOut problems={[problem]} units="imperial" role="detailer" onRecorded={async () => undefined} />);
    expect(screen.queryByRole("button")).toBeNull();
    await screen.findByText(/Ruth Alvarado/);
  });
});

describe("the true shape without WebGL", () => {
  it("says so in a sentence", async () => {
    vi.spyOn(HTMLCanvasElement.prototype, "getContext").mockReturnValue(null);
    render(<ShapeView model={buildModel(document20(), emptyMarks(), [])} activePointId={null} />);
    expect(await screen.findByText(NO_WEBGL)).toBeTruthy();
  });
});
