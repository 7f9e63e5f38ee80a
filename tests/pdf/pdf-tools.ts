/** What pdfsig (poppler-utils) and qpdf say of a PDF. */
import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";

function told(program: string, args: readonly string[], bytes: Uint8Array): { readonly code: number | null; readonly text: string } {
  const folder = mkdtempSync(path.join(tmpdir(), "sheet-"));
  try {
    const file = path.join(folder, "sheet.pdf");
    writeFileSync(file, bytes);
    const { status, stdout, stderr, error } = spawnSync(program, [...args, file], { encoding: "utf8", timeout: 60_000 });
    if (error) throw error;
    return { code: status, text: `${stdout}${stderr}` };
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** Everything pdfsig says of the signatures. */
export function pdfsig(bytes: Uint8Array): string {
  return told("pdfsig", [], bytes).text;
}

/** Warnings and errors of `qpdf --check`; none is "". */
export function qpdfFindings(bytes: Uint8Array): string {
  const { code, text } = told("qpdf", ["--check"], bytes);
  return code === 0 && /No syntax or stream encoding errors found/.test(text) ? "" : text;
}
