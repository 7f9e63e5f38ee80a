// @vitest-environment jsdom
/** The panel of a fit: verdict first, flags in words, tolerances that change it, and the field-fit weld taken over. */
import { cleanup, fireEvent, render, screen, waitFor, within } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { closeBetween, emptySurvey, usualFitSettings, type CloseBetweenInput, type ClosingFound, type FitTrim, type SurveyDocument, type SurveyReading } from "@/iso";
import { FitPanel, type FitPanelProps } from "@/components/fit/fit-panel";
import { defaultLineSettings } from "@/lib/rules/default-settings";

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const INCH = 25.4;
const input: CloseBetweenInput = {
  end0: { position: [0, 0, 0], direction: [0, 1, 0] }, end1: { position: [20.5 * INCH, 40 * INCH, 12 * INCH], direction: [0, -1, 0] },
  radius0Mm: 6 * INCH, radius1Mm: 6 * INCH, rootGapMm: INCH / 8, thetaMaxRad: Math.PI / 2, units: "imperial", odMm: 4.5 * INCH,
};

function show(change: Partial<FitPanelProps> = {}, of: CloseBetweenInput = input): void {
  const answer = closeBetween(of) as ClosingFound;
  render(<FitPanel input={of} answer={answer} surveyedIds={[null, null]} lineId={null} nps="4" settings={defaultLineSettings("imperial")} {...change} />);
}
const verdict = () => screen.getByText(/^Fits without trim/).textContent ?? "";
const chance = () => Number(/about (\d+) times/.exec(verdict())?.[1] ?? Number.NaN);

describe("FitPanel", () => {
  it("says the verdict first, then the chance as a picture with words, and the caution", () => {
    show();
    expect(verdict()).toMatch(/^Fits without trim about \d+ times in 100; leave \d\/\d in at the joint of .* and it is (over )?9\d\.$/);
    expect(screen.getByRole("img", { name: /^\d+ in 100; 95 wanted$/ })).toBeTruthy();
    expect(screen.getByText(/Do not pull, jack or heat to fit/)).toBeTruthy();
    expect(within(screen.getByRole("table", { name: /How far the piece may miss/ })).getAllByRole("row")).toHaveLength(7);
  });

  it("works again from a tolerance just typed, and waits for one it cannot read", async () => {
    show();
    const before = chance();
    fireEvent.change(screen.getByLabelText(/^End not surveyed, position/), { target: { value: "1/4" } });
    await waitFor(() => expect(chance()).toBeLessThan(before - 20));
    fireEvent.change(screen.getByLabelText(/^Cut length/), { target: { value: "a bit" } });
    await waitFor(() => expect(screen.getByText(/A tolerance below cannot be read/)).toBeTruthy());
    await waitFor(() => expect(screen.getByLabelText(/^Cut length/).getAttribute("aria-invalid")).toBe("true"));
  });

  it("starts from the line's own tolerances", () => {
    const usual = usualFitSettings("imperial");
    show({ settings: { ...defaultLineSettings("imperial"), fit: { ...usual, shop: { ...usual.shop, cutLengthMm: INCH / 4 } } } });
    expect((screen.getByLabelText(/^Cut length/) as HTMLInputElement).value).toBe("1/4 in");
    expect(screen.getByText(/^Cut length/, { selector: "span" })).toBeTruthy();
  });

  it("all at end 1: one column instead of three, and a smaller chance", async () => {
    show();
    const shared = chance();
    fireEvent.change(screen.getByLabelText("Fit-up"), { target: { value: "set-true" } });
    await waitFor(() => expect(screen.queryByRole("columnheader", { name: "Left at end 0" })).toBeNull());
    expect(chance()).toBeLessThan(shared);
  });

  it("flags a closing near a fold instead of a number", () => {
    const R = 6 * INCH;
    show({}, { ...input, rootGapMm: 0, end1: { position: [2 * R, Math.hypot(2 * R, INCH), 0], direction: [0, -1, 0] } });
    expect(screen.getByText(/No figure for this one/)).toBeTruthy();
    expect(screen.queryByRole("img")).toBeNull();
  });

  it("hands over the field-fit weld that is ticked, and only where something can be inserted", () => {
    show();
    expect(screen.queryByRole("checkbox")).toBeNull();
    cleanup();
    const onTake = vi.fn<(trim: FitTrim | null) => void>();
    show({ onTake, taken: null });
    fireEvent.click(screen.getAllByRole("checkbox", { name: "Insert as FFW" })[0]!);
    expect(onTake.mock.calls[0]![0]).toMatchObject({ jointId: expect.stringMatching(/^elbow[01]$/), trimMm: expect.any(Number) });
  });

  it("names the readings of a survey, and says when they do not fit together", async () => {
    const survey = surveyed("");
    vi.stubGlobal("fetch", vi.fn(async () => Response.json({ line: { id: "l1", number: "L", title: "" }, job: { id: "j", number: "J" }, version: 1, document: survey, odMm: 114.3, uploads: [], updatedAt: null, updatedBy: null })));
    show({ surveyedIds: ["n1", "n2"], lineId: "l1" });
    await waitFor(() => expect(screen.getByText("Tape A-B")).toBeTruthy());
    expect(screen.queryByLabelText(/^End not surveyed/)).toBeNull();
    expect(screen.queryByText(/do not fit together/)).toBeNull();
  });
});

/** End 0 at a known mark; end 1 by a tape, offsets and a bearing each. */
function surveyed(note: string): SurveyDocument {
  const base = { again: ["", "", ""], tolerance: "", leftOut: false, note };
  const readings: SurveyReading[] = [
    { ...base, id: "a", kind: "point", from: "", to: "A", first: ["0", "0", "0"], tool: "known" },
    { ...base, id: "o", kind: "offset", from: "A", to: "B", first: ["20 1/2", "40", "12"], tool: "tape" },
    { ...base, id: "t", kind: "tape", from: "A", to: "B", first: [String(Math.round(Math.hypot(20.5, 40, 12) * 16) / 16)], tool: "tape" },
  ];
  const ends = [
    { id: "n1", name: "N1", centre: "A", axis: { kind: "bearing" as const, points: "N" }, tolerance: "0.2" },
    { id: "n2", name: "N2", centre: "B", axis: { kind: "bearing" as const, points: "S" }, tolerance: "0.2" },
  ];
  return { ...emptySurvey("imperial"), readings, ends };
}
