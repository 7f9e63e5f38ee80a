// @vitest-environment jsdom
/** A file of points in the dialog: nothing comes in before the rows that are not understood were shown and set aside. */
import { cleanup, fireEvent, render, screen, waitFor, within } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import type { RunDocument } from "@/iso";
import { ImportView } from "@/components/exchange/import-dialog";
import { sampleDocument } from "../factories";
import "./browser";

afterEach(() => {
  cleanup();
  localStorage.clear();
});

const ROWS = 5_000;
const BROKEN = 50;
/** Row numbers of the broken ones, as the spreadsheet shows them. */
const brokenRows = Array.from({ length: BROKEN }, (_, index) => 11 + index * 99);

function bigFile(): File {
  const rows = Array.from({ length: ROWS }, (_, index) => (brokenRows.includes(index + 2) ? "abc,0,0" : "1-0,0,0"));
  return new File([`Weite,North,Up\n${rows.join("\n")}\n`], "survey.csv");
}

function opened(onImport: (document: RunDocument) => void = () => undefined): void {
  render(<ImportView document={sampleDocument("L-1")} by="Pat" onImport={onImport} />);
}

async function choose(file: File): Promise<void> {
  fireEvent.change(screen.getByLabelText(/^Choose/), { target: { files: [file] } });
  await screen.findByText("What its columns mean");
}

const pick = (label: string | RegExp, value: string) => fireEvent.change(screen.getByLabelText(label), { target: { value } });
const bringIn = () => screen.getByRole("button", { name: /^Bring in/ }) as HTMLButtonElement;

describe("ImportView", () => {
  it("matches columns, shows each of 50 broken rows of 5 000, and brings in a range of the good ones as one document", async () => {
    const imported: RunDocument[] = [];
    opened((document) => imported.push(document));
    await choose(bigFile());
    // A head it does not know is left out until somebody says what it means.
    pick(/^Weite/, "east");
    const faults = within(await screen.findByRole("region", { name: "Rows not understood" }));
    expect(faults.getAllByRole("row").slice(1).map((row) => Number(within(row).getAllByRole("cell")[0]!.textContent))).toEqual(brokenRows);
    expect(screen.getByText(/4.950 rows understood/)).toBeTruthy();
    expect(screen.getByText(/2.000 points; this would make 4.954/)).toBeTruthy();
    expect(bringIn().disabled).toBe(true);
    pick("To row", "501");
    await waitFor(() => expect(screen.queryByText(/2.000 points/)).toBeNull());
    expect(bringIn().disabled).toBe(true);
    fireEvent.click(screen.getByLabelText(/^Leave out the 5 rows/));
    expect(bringIn().textContent).toMatch(/Bring in 495 points/);
    fireEvent.click(bringIn());
    expect(imported.map((document) => document.runs[0]!.points.length)).toEqual([4 + 495]);
  }, 60_000);

  it("remembers how a file with the same heads was matched", async () => {
    opened();
    await choose(new File(["Weite,North,Up\n1-0,0,0\n"], "a.csv"));
    pick(/^Weite/, "east");
    fireEvent.click(bringIn());
    cleanup();
    opened();
    await choose(new File(["Weite,North,Up\n2-0,0,0\n"], "b.csv"));
    expect((screen.getByLabelText(/^Weite/) as HTMLSelectElement).value).toBe("east");
  });

  it("says what is wrong with a file that is none", async () => {
    opened();
    fireEvent.change(screen.getByLabelText(/^Choose/), { target: { files: [new File([Uint8Array.from([0x89, 0x50, 0, 0, 1, 2, 0, 200])], "a.csv")] } });
    expect((await screen.findByRole("alert")).textContent).toMatch(/neither a CSV nor an XLSX/);
  });
});
