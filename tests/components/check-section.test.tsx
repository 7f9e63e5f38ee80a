// @vitest-environment jsdom
/** Actuals at the check dimensions: read as typed, answered at once, recorded as they were answered. */
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import { buildModel, emptyMarks } from "@/iso";
import { CheckSection } from "@/components/spool/check-section";
import { sampleRuns } from "../fixtures/sample-runs";
import { benchInput } from "../iso/layout/bench-inputs";
import { answerWith, prepareDialogs } from "./browser";
import { spoolDetail } from "./review-fixture";

beforeAll(prepareDialogs);
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const document = sampleRuns.twoSpools!;
const input = benchInput(document, "letter");
const model = buildModel(document, emptyMarks(), []);

function show(open: boolean, work: Parameters<typeof spoolDetail>[0] = {}): void {
  render(<CheckSection spool={spoolDetail(work)} input={input} model={model} open={open} />);
}
const typed = (name: RegExp, value: string) => fireEvent.change(screen.getByLabelText(name), { target: { value } });

describe("CheckSection", () => {
  it("answers go, trim and stop beside what was typed", () => {
    show(true);
    typed(/^Actual of C1 .* E$/, `6' 1/16"`);
    expect(screen.getByText(/^go: within 1\/8 in$/)).toBeTruthy();
    typed(/^Actual of C2 .* N$/, `5' 3/8"`);
    expect(screen.getByText(/^trim 7\/16 in at end 2/)).toBeTruthy();
    typed(/^Actual of C3 .* UP$/, `8' 3"`);
    expect(screen.getByText(/^stop: 1 in short\. .*do not pull, jack or heat to fit/)).toBeTruthy();
  });

  it("says what it cannot read and records nothing of it", () => {
    show(true);
    typed(/^Actual of C1 /, "six feet");
    expect(screen.getByLabelText(/^Actual of C1 /).getAttribute("aria-invalid")).toBe("true");
    expect(screen.queryByRole("button", { name: /Record the actual/ })).toBeNull();
  });

  it("records the text with its answer under the check's own key", async () => {
    const sent = answerWith(200, {});
    show(true);
    typed(/^Actual of C1 /, `6' 1/16"`);
    fireEvent.click(screen.getByRole("button", { name: "Record the actual of C1" }));
    await waitFor(() => expect(sent.filter(({ method }) => method === "POST")).toHaveLength(1));
    expect(sent.find(({ method }) => method === "POST")).toMatchObject({
      path: "/api/spools/s1/work",
      body: { kind: "actual", mark: "C1 E", key: "check:ends:1-2:e", values: { actual: `6' 1/16"`, remarks: "go: within 1/8 in" } },
    });
  });

  it("answers on a sheet that is not open, and offers no record", () => {
    show(false);
    typed(/^Actual of C1 /, `6'`);
    expect(screen.getByText(/^go/)).toBeTruthy();
    expect(screen.queryByRole("button", { name: /Record/ })).toBeNull();
  });

  it("shows what was recorded before", () => {
    show(true, { work: [{ id: "1", kind: "actual", mark: "C1 E", key: "check:ends:1-2:e", values: { actual: `6'`, remarks: "go: within 1/8 in" }, by: "Danny Kowal", at: "2026-01-01T00:00:00Z", revisionCode: "A" }] });
    expect(screen.getByText(/Danny Kowal, rev A/)).toBeTruthy();
  });
});
