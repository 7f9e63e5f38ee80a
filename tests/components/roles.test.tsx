// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import { homeOf, isPublicPath, placeOfPath, placesFor } from "@/components/shell/places";
import { LogCell } from "@/components/spool/log-cell";
import { actsFor } from "@/components/spool/revision-history";
import { WorkDialog } from "@/components/spool/work-dialog";
import type { Role, WorkKind } from "@/lib/rules/api-types";
import { prepareDialogs } from "./browser";

beforeAll(prepareDialogs);
afterEach(cleanup);

const KINDS: readonly WorkKind[] = ["fit-up", "weld", "visual"];

function offered(role: Role, open: boolean): string[] {
  const { unmount } = render(
    <LogCell entries={[]} kinds={KINDS} role={role} open={open} markName="5" onRecord={() => undefined} />,
  );
  const names = screen.queryAllByRole("button").map((button) => button.textContent ?? "");
  unmount();
  return names;
}

describe("the log offers a role what the table of roles allows", () => {
  it("a fitter records fit-up and weld, an inspector also the examination, a detailer reads", () => {
    expect(offered("fitter", true)).toEqual(["Fit-up", "Weld"]);
    expect(offered("inspector", true)).toEqual(["Fit-up", "Weld", "Visual"]);
    expect(offered("owner", true)).toEqual(["Fit-up", "Weld", "Visual"]);
    expect(offered("detailer", true)).toEqual([]);
  });

  it("offers nothing when no sheet is in force or it is on hold", () => {
    expect(offered("inspector", false)).toEqual([]);
  });
});

describe("places", () => {
  it("starts each role where its day starts", () => {
    expect(homeOf("fitter")).toBe("/bench");
    expect(homeOf("detailer")).toBe("/jobs");
  });

  it("puts the bench first for a fitter and the outbox in the demo only", () => {
    expect(placesFor({ role: "fitter", demo: false }).map((place) => place.label)).toEqual([
      "Bench",
      "Jobs",
      "Shop",
    ]);
    expect(placesFor({ role: "owner", demo: true }).map((place) => place.label)).toEqual([
      "Jobs",
      "Bench",
      "Shop",
      "Outbox",
    ]);
  });

  it("knows which paths need no sign-in and to which place a path belongs", () => {
    expect(isPublicPath("/status/abc")).toBe(true);
    expect(isPublicPath("/statusquo")).toBe(false);
    expect(placeOfPath("/spools/1")).toBe("/jobs");
    expect(placeOfPath("/shop")).toBe("/shop");
  });
});

describe("steps of a revision", () => {
  it("offers as-built to a live sheet only, release instead of hold, and nothing to a dead one", () => {
    expect(actsFor({ state: "for-fabrication", hold: false })).toEqual(["hold", "as-built", "void"]);
    expect(actsFor({ state: "for-fabrication", hold: true })).toEqual(["release", "void"]);
    expect(actsFor({ state: "superseded", hold: false })).toEqual([]);
    expect(actsFor({ state: "void", hold: false })).toEqual([]);
  });
});

describe("work entries", () => {
  const target = {
    spoolId: "s1",
    mark: "P1",
    key: "m-2:1",
    about: "Cut length 28 1/4 in",
    field: false,
  } as const;

  it("puts the caution at the heat field", () => {
    render(<WorkDialog target={{ ...target, kind: "cut" }} onClose={() => undefined} />);
    const heat = screen.getByLabelText("Heat no.");
    const described = document.getElementById(heat.getAttribute("aria-describedby") ?? "");
    expect(described?.textContent).toContain("look-alike elbows get swapped");
  });

  it("warns at a field weld, not at a shop weld", () => {
    const { rerender } = render(
      <WorkDialog target={{ ...target, kind: "weld", field: true }} onClose={() => undefined} />,
    );
    expect(screen.getByText(/hot-work permit/)).toBeTruthy();
    rerender(<WorkDialog target={{ ...target, kind: "weld", field: false }} onClose={() => undefined} />);
    expect(screen.queryByText(/hot-work permit/)).toBeNull();
  });

  it("does not record a weld without its welder", async () => {
    const close = vi.fn();
    render(<WorkDialog target={{ ...target, kind: "weld" }} onClose={close} />);
    fireEvent.click(screen.getByRole("button", { name: "Record" }));
    expect(await screen.findByText("Enter who welded it.")).toBeTruthy();
    expect(close).not.toHaveBeenCalled();
  });
});
