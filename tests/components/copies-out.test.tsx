// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { SWRConfig } from "swr";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { CopiesOut, JobWithdrawals } from "@/components/spool/copies-out";
import { OwnWithdrawals } from "@/components/spool/own-withdrawals";
import { WithdrawalList } from "@/components/spool/withdrawal-list";
import { byHolder, holderNote, mustWithdraw, ORIGINAL, UNCONTROLLED, type CopyRow } from "@/lib/rules/copies";
import type { Role } from "@/lib/rules/api-types";
import "./browser";

const row = (id: string, more: Partial<CopyRow> = {}): CopyRow => ({
  id, by: "Pat Ruiz", mine: false, at: "2026-01-02T10:00:00Z", kind: "fabrication", marked: UNCONTROLLED, spoolId: "s", line: "4-CW-1101", spool: "A",
  sheetNumber: "0007", code: "A", state: "superseded", hold: false, withdraw: true, withdrawn: null, ...more,
});

const sent: { path: string; body: unknown }[] = [];
let rows: CopyRow[] = [];

beforeEach(() => {
  sent.length = 0;
  vi.stubGlobal("fetch", async (path: string, init?: RequestInit) => {
    if (init?.method === "POST") sent.push({ path, body: JSON.parse(String(init.body)) });
    const named = path === "/api/jobs/j" ? { number: "26-114", title: "Pump house" } : path === "/api/spools/s" ? { letter: "A", line: { number: "4-CW-1101" } } : rows;
    return new Response(JSON.stringify(init?.method === "POST" ? { ok: true } : named), { status: 200, headers: { "content-type": "application/json" } });
  });
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const show = (role: Role) => render(<SWRConfig value={{ provider: () => new Map() }}><CopiesOut spoolId="s" role={role} /></SWRConfig>);

const alone = (element: React.ReactElement) => render(<SWRConfig value={{ provider: () => new Map() }}>{element}</SWRConfig>);

describe("those who hold one", () => {
  it("read it on their own pages, each sheet once, and nothing when they hold none", async () => {
    rows = [row("1"), row("2", { marked: ORIGINAL }), row("3", { spoolId: "t", sheetNumber: "0009", hold: true, state: "for-fabrication" })];
    const { container } = alone(<OwnWithdrawals />);
    expect(await screen.findByText(/You hold 3 copies of sheets that are not to be worked from/)).toBeTruthy();
    expect(screen.getAllByRole("link").map((link) => [link.textContent, link.getAttribute("href")])).toEqual([["0007 rev A", "/spools/s#copies-out"], ["0009 rev A", "/spools/t#copies-out"]]);
    expect(container.textContent).toContain("(SUPERSEDED)");
    expect(container.textContent).toContain("(HOLD)");
    cleanup();
    rows = [];
    const empty = alone(<OwnWithdrawals />);
    await Promise.resolve();
    expect(empty.container.textContent).toBe("");
  });
});

describe("the list to print", () => {
  it("goes person by person and leaves out what need not come back", async () => {
    rows = [row("1"), row("2", { by: "Ola Berg", at: "2026-01-02T10:00:00Z" }), row("3", { by: "Ola Berg", at: "2026-01-05T10:00:00Z" }), row("4", { by: "Kim Ash", withdraw: false })];
    expect(byHolder(rows.filter((one) => one.withdraw)).map(({ by, copies }) => [by, ...copies.map(({ id }) => id)])).toEqual([["Ola Berg", "3", "2"], ["Pat Ruiz", "1"]]);
    alone(<WithdrawalList path="/api/jobs/j/copies" of="job" back="/jobs/j" />);
    expect((await screen.findAllByRole("heading", { level: 2 })).map((heading) => heading.textContent)).toEqual(["Ola Berg, 2 copies", "Pat Ruiz, 1 copy"]);
    expect(screen.getByText(/3 copies still out on /)).toBeTruthy();
    expect(await screen.findByRole("heading", { level: 1, name: "Job 26-114, Pump house" })).toBeTruthy();
    cleanup();
    rows = [row("4", { withdraw: false })];
    alone(<WithdrawalList path="/api/spools/s/copies" of="spool" back="/spools/s" />);
    expect(await screen.findByText("Nothing to withdraw")).toBeTruthy();
    expect(await screen.findByRole("heading", { level: 1, name: "4-CW-1101 spool A" })).toBeTruthy();
  });
});

describe("copies out", () => {
  it("names who holds what and what has to come back, and marks all at once", async () => {
    rows = [row("1"), row("2", { by: "Ola Berg", marked: ORIGINAL }), row("3", { by: "Kim Ash", withdraw: false, withdrawn: { by: "Ola Berg", at: "2026-01-03T10:00:00Z" } })];
    show("inspector");
    expect((await screen.findByText(/2 copies of a sheet that is not to be worked from are still/))).toBeTruthy();
    expect(screen.getByText("Downloaded, unmarked")).toBeTruthy();
    expect(screen.getAllByText("To withdraw")).toHaveLength(2);
    fireEvent.click(screen.getByRole("button", { name: "Mark all 2 withdrawn" }));
    await waitFor(() => expect(sent).toEqual([{ path: "/api/copies/withdraw", body: { copyIds: ["1", "2"] } }]));
  });

  it("lets a fitter mark their own only", async () => {
    rows = [row("1"), row("2", { by: "Me", mine: true })];
    show("fitter");
    const buttons = await screen.findAllByRole("button", { name: /as withdrawn/ });
    expect(buttons.map((button) => button.getAttribute("aria-label"))).toEqual([expect.stringContaining("copy of Me")]);
  });

  it("says so when nobody took any, and a job shows nothing then", async () => {
    rows = [];
    show("owner");
    expect(await screen.findByText(/Nobody printed or downloaded/)).toBeTruthy();
    cleanup();
    const { container } = render(<SWRConfig value={{ provider: () => new Map() }}><JobWithdrawals jobId="j" role="owner" /></SWRConfig>);
    await Promise.resolve();
    expect(container.textContent).toBe("");
  });
});

describe("what has to come back", () => {
  it("is what looks like a sheet to work from while its revision is none", () => {
    const copy = { kind: "fabrication", marked: UNCONTROLLED, state: "superseded", hold: false, withdrawn: false } as const;
    expect(mustWithdraw(copy)).toBe(true);
    expect(mustWithdraw({ ...copy, marked: ORIGINAL, state: "void" })).toBe(true);
    expect(mustWithdraw({ ...copy, state: "for-fabrication", hold: true })).toBe(true);
    for (const other of [{ state: "for-fabrication" }, { state: "as-built" }, { withdrawn: true }, { marked: "SUPERSEDED" }, { kind: "review" }] as const) {
      expect(mustWithdraw({ ...copy, ...other }), JSON.stringify(other)).toBe(false);
    }
  });

  it("is told a holder in a mail, and nothing to others", () => {
    expect(holderNote([])).toBe("");
    expect(holderNote([{ marked: ORIGINAL, at: "2026-01-02T10:11:12.000Z" }])).toContain("- Downloaded, unmarked, 2026-01-02 10:11 UTC");
  });
});
