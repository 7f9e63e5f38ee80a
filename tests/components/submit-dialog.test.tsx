// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import { SubmitDialog } from "@/components/spool/submit-dialog";
import { answerWith, prepareDialogs } from "./browser";
import { spoolDetail } from "./review-fixture";

beforeAll(prepareDialogs);
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const DESCRIPTION = "What this revision is for";

describe("SubmitDialog", () => {
  it("wants to know what the revision is for before it sends", async () => {
    const sent = answerWith(200, {});
    render(<SubmitDialog open spool={spoolDetail()} size="A3" onClose={() => undefined} />);
    fireEvent.click(screen.getByRole("button", { name: "Submit for review" }));
    expect(await screen.findByText("Enter what this revision is for.")).toBeTruthy();
    expect(sent).toEqual([]);
  });

  it("sends description and sheet size, then closes", async () => {
    const sent = answerWith(200, {});
    const closed = vi.fn();
    render(<SubmitDialog open spool={spoolDetail()} size="A3" onClose={closed} />);
    fireEvent.change(screen.getByLabelText(DESCRIPTION), { target: { value: "Issued for fabrication" } });
    fireEvent.click(screen.getByRole("button", { name: "Submit for review" }));
    await waitFor(() => expect(closed).toHaveBeenCalledTimes(1));
    expect(sent).toEqual([
      {
        method: "POST",
        path: "/api/spools/s1/submit",
        body: { description: "Issued for fabrication", size: "A3" },
      },
    ]);
  });

  it("keeps what was typed when the server refuses", async () => {
    answerWith(409, { code: "conflict", message: "Revision A is already FOR REVIEW." });
    render(<SubmitDialog open spool={spoolDetail()} size="A3" onClose={() => undefined} />);
    fireEvent.change(screen.getByLabelText(DESCRIPTION), { target: { value: "Issued" } });
    fireEvent.click(screen.getByRole("button", { name: "Submit for review" }));
    expect((await screen.findByRole("alert")).textContent).toContain("Revision A is already FOR REVIEW.");
    expect((screen.getByLabelText(DESCRIPTION) as HTMLInputElement).value).toBe("Issued");
  });

  it("says first what work the new revision falls upon", () => {
    const entry = { values: {}, by: "Danny Kowal", at: "2026-01-01T00:00:00Z", revisionCode: "A" };
    const work = [
      { ...entry, id: "1", kind: "cut" as const, mark: "P1", key: "m-2:1" },
      { ...entry, id: "2", kind: "cut" as const, mark: "P1", key: "m-2:1" },
      { ...entry, id: "3", kind: "weld" as const, mark: "1", key: "m-2:in" },
    ];
    render(<SubmitDialog open spool={spoolDetail({ work })} size="A3" onClose={() => undefined} />);
    expect(screen.getByText(/1 piece cut, 1 weld made/)).toBeTruthy();
  });
});
