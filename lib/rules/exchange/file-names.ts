/** Names of files that leave the house: what it is, of what, and in what state, so that a draft never passes for an issue. */
import type { SheetInput } from "@/iso";
import { stateText } from "./list-table";

/** "L-101-spool-A-cut-list-rev-B-FOR-FABRICATION.csv"; a draft has DRAFT in place of the revision. */
export function exportFileName(inputs: readonly SheetInput[], what: string, extension: string, part = ""): string {
  const first = inputs[0];
  const line = first?.document.number ?? "line";
  const spool = inputs.length === 1 && first ? `-spool-${first.spool}` : "";
  return `${plainName(`${line}${spool}-${what}${part}-${issueText(inputs)}`)}.${extension}`;
}

function issueText(inputs: readonly SheetInput[]): string {
  const states = [...new Set(inputs.map((input) => (input.revision.state === "draft" ? "DRAFT" : `${inputs.length === 1 ? `rev-${input.revision.code}-` : ""}${stateText(input)}`)))];
  return states.length === 1 ? (states[0] ?? "") : inputs.length === 0 ? "DRAFT" : "ISSUED";
}

/** Letters, digits, dots and dashes; nothing a file system or a header trips over. */
export function plainName(text: string): string {
  return text.replace(/[^A-Za-z0-9.-]+/g, "-").replace(/-+/g, "-").replace(/^[-.]+|-+$/g, "").slice(0, 120);
}
