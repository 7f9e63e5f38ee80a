// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { SheetSetPrint } from "@/components/spool/sheet-set-print";
import { prepareDialogs } from "./browser";

beforeAll(prepareDialogs);
beforeEach(() => localStorage.clear());
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

const open = (issued = true) => {
  const opened = vi.spyOn(window, "open").mockReturnValue(null);
  render(<SheetSetPrint spoolId="s1" issued={issued} size={null} />);
  fireEvent.click(screen.getByRole("button", { name: "Print a set" }));
  return opened;
};
const tick = (label: RegExp) => fireEvent.click(screen.getByLabelText(label));
const VERIFY = /I will verify each length by tape/;
const print = () => fireEvent.click(screen.getByRole("button", { name: "Open the PDF" }));

describe("SheetSetPrint", () => {
  it("asks to verify by tape before a cut map is printed, and not without one", async () => {
    const opened = open();
    print();
    expect(await screen.findByText("Tick this before the cut map is printed.")).toBeTruthy();
    expect(opened).not.toHaveBeenCalled();
    tick(/^Cut map/);
    await waitFor(() => expect(screen.queryByLabelText(VERIFY)).toBeNull());
    print();
    await waitFor(() => expect(opened).toHaveBeenCalledWith("/api/spools/s1/sheet-set?parts=sheet,welds&of=issued", "_blank", "noopener"));
  });

  it("opens what was chosen, in the order it prints, and remembers it but for the tick", async () => {
    const opened = open(false);
    tick(/^Legend/);
    tick(/^Weld map/);
    tick(/half an inch/);
    fireEvent.change(screen.getByLabelText("Paper"), { target: { value: "A4" } });
    tick(VERIFY);
    print();
    await waitFor(() => expect(opened).toHaveBeenCalledWith("/api/spools/s1/sheet-set?parts=sheet,cuts,legend&of=draft&size=A4&fit=1", "_blank", "noopener"));
    await waitFor(() => expect(screen.queryByLabelText("Paper")).toBeNull());
    fireEvent.click(screen.getByRole("button", { name: "Print a set" }));
    const checked = (label: RegExp) => (screen.getByLabelText(label) as HTMLInputElement).checked;
    expect([checked(/^Legend/), checked(/^Weld map/), checked(/half an inch/), checked(VERIFY)]).toEqual([true, false, true, false]);
    expect((screen.getByLabelText("Paper") as HTMLSelectElement).value).toBe("A4");
  });

  it("wants at least one part, and starts anew from a store it cannot read", async () => {
    localStorage.setItem("quarterline.set", "{broken");
    const opened = open();
    for (const part of [/^Spool sheet/, /^Cut map/, /^Weld map/]) tick(part);
    print();
    expect(await screen.findByText("Choose at least one part.")).toBeTruthy();
    expect(opened).not.toHaveBeenCalled();
  });
});
