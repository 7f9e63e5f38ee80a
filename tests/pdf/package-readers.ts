/** Packages as programs read them that share nothing with what wrote them. */
import { spawnSync } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";

export interface Outline {
  readonly title: string;
  readonly destpageposfrom1: number;
  readonly kids: readonly Outline[];
}

export interface QpdfFound {
  readonly outlines: readonly Outline[];
  readonly pagelabels: readonly { readonly index: number; readonly label: Readonly<Record<string, string>> }[];
  readonly pages: readonly unknown[];
}

/** A whole PDF as qpdf reads its structure. */
export function qpdfJson(bytes: Uint8Array): QpdfFound {
  const folder = mkdtempSync(path.join(tmpdir(), "package-"));
  try {
    const file = path.join(folder, "package.pdf");
    writeFileSync(file, bytes);
    const { stdout } = spawnSync("qpdf", ["--json=1", "--json-key=outlines", "--json-key=pagelabels", "--json-key=pages", file], { encoding: "utf8", maxBuffer: 1e9 });
    return JSON.parse(stdout);
  } finally {
    rmSync(folder, { recursive: true });
  }
}
/** A zip's files as unzip (Info-ZIP) gives them. @throws when it finds anything wrong. */
export function unzipped(bytes: Uint8Array): Map<string, Buffer> {
  const folder = mkdtempSync(path.join(tmpdir(), "package-"));
  try {
    writeFileSync(path.join(folder, "package.zip"), bytes);
    const { status, stdout } = spawnSync("unzip", ["-tq", "package.zip"], { cwd: folder, encoding: "utf8" });
    if (status !== 0) throw new Error(`unzip found: ${stdout}`);
    spawnSync("unzip", ["-q", "package.zip", "-d", "out"], { cwd: folder });
    const out = path.join(folder, "out");
    const names = (readdirSync(out, { recursive: true }) as string[]).filter((name) => /\./.test(path.basename(name)) || name === "SHA256SUMS");
    return new Map(names.sort().map((name) => [name, readFileSync(path.join(out, name))]));
  } finally {
    rmSync(folder, { recursive: true });
  }
}
