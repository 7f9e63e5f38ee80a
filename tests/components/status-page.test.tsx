// @vitest-environment jsdom
import { Blob as NodeBlob, File as NodeFile } from "node:buffer";
import { createHash } from "node:crypto";
import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { FileCheck } from "@/components/status/file-check";
import { fileSha256 } from "@/components/status/hash";
import { Verdict, verdictText } from "@/components/status/verdict";
import type { StatusDetail } from "@/lib/rules/api-types";
import "./browser";

afterEach(cleanup);

const PDF = "%PDF-1.7 a sheet";
const status: StatusDetail = {
  sheetNumber: "S-0001",
  shop: "Shop",
  line: "4-CW-101",
  spool: "A",
  code: "A",
  state: "for-fabrication",
  hold: false,
  current: true,
  issuedAt: "2026-01-01T00:00:00Z",
  liveCode: null,
  sheets: [{ sha256: createHash("sha256").update(PDF).digest("hex"), kind: "fabrication", marked: null, at: "2026-01-01T00:00:00Z" }],
  signature: null,
};

/** Node's own file: the bytes of a jsdom file are of another realm, which Node's digest refuses. */
function pdf(text: string): File {
  return new NodeFile([text], "sheet.pdf", { type: "application/pdf" }) as unknown as File;
}

describe("Verdict", () => {
  it("says CURRENT with its shape", () => {
    const { container } = render(<Verdict status={status} />);
    expect(screen.getByRole("heading", { name: "CURRENT" })).toBeTruthy();
    expect(container.querySelector('svg[data-shape="current"]')).not.toBeNull();
  });

  it("says NOT CURRENT with another shape", () => {
    const { container } = render(
      <Verdict status={{ ...status, current: false, state: "superseded", liveCode: "B" }} />,
    );
    expect(screen.getByRole("heading", { name: "NOT CURRENT" })).toBeTruthy();
    expect(container.querySelector('svg[data-shape="not-current"]')).not.toBeNull();
  });

  it("gives the reason that matters first", () => {
    const old = { ...status, current: false };
    expect(verdictText({ ...old, hold: true, liveCode: "B" })).toContain("HOLD");
    expect(verdictText({ ...old, state: "superseded", liveCode: "B" })).toContain("Revision B is in force");
    expect(verdictText({ ...old, state: "for-review" })).toContain("not signed yet");
    expect(verdictText({ ...old, state: "void" })).toContain("No revision of this spool is in force");
  });
});

describe("FileCheck", () => {
  it("hashes a file as SHA-256 does", async () => {
    // FIPS 180-4, the published example "abc".
    expect(await fileSha256(new NodeBlob(["abc"]) as unknown as Blob)).toBe(
      "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad",
    );
  });

  it("recognizes a dropped PDF of this revision", async () => {
    render(<FileCheck onReread={async () => undefined} status={status} />);
    fireEvent.drop(screen.getByText(/Drop a PDF/), { dataTransfer: { files: [pdf(PDF)] } });
    expect(
      (await screen.findByText(/the signed original of revision A, unaltered/)).textContent,
    ).toContain("That revision is current");
  });

  it("says so when a recognized sheet is dead", async () => {
    render(<FileCheck onReread={async () => undefined} status={{ ...status, current: false }} />);
    fireEvent.drop(screen.getByText(/Drop a PDF/), { dataTransfer: { files: [pdf(PDF)] } });
    expect((await screen.findByText(/the signed original of revision A/)).textContent).toContain("NOT CURRENT");
  });

  it("does not know one changed byte", async () => {
    render(<FileCheck onReread={async () => undefined} status={status} />);
    fireEvent.change(screen.getByLabelText("Choose a PDF"), { target: { files: [pdf(`${PDF}.`)] } });
    expect((await screen.findByText("Not recognized.")).parentElement?.textContent).toContain("is not ours");
  });

  it("tells a marked copy from the original, and where the signature is", async () => {
    const [sheet] = status.sheets;
    const signed: StatusDetail = {
      ...status,
      current: false,
      sheets: [{ ...sheet!, marked: "SUPERSEDED", at: "2026-02-03T10:00:00Z" }],
      signature: { sha256: "0a".repeat(32), subject: "Shop", fingerprint: "0b".repeat(32) },
    };
    render(<FileCheck onReread={async () => undefined} status={signed} />);
    fireEvent.drop(screen.getByText(/Drop a PDF/), { dataTransfer: { files: [pdf(PDF)] } });
    const said = (await screen.findByText(/marked SUPERSEDED, of the signed original/)).textContent;
    expect(said).toContain("NOT CURRENT");
    expect(said).toContain("the copy carries no digital signature");
  });
});
