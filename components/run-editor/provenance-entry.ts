/** Reads the Source cell: where a number came from. */
import type { Provenance } from "@/iso";
import { refused, understood, type EntryResult } from "./entry-result";

export type ProvenanceKind = Provenance["kind"];

export const PROVENANCE_LABEL: Readonly<Record<ProvenanceKind, string>> = {
  measured: "measured",
  "from-drawing": "from drawing",
  calculated: "calculated",
  assumed: "assumed",
};

/** What the narrow cell shows. */
export const PROVENANCE_WORD: Readonly<Record<ProvenanceKind, string>> = {
  measured: "measured",
  "from-drawing": "drawing",
  calculated: "calculated",
  assumed: "assumed",
};

export const PROVENANCE_HINT = "Type m for measured, d for from drawing, c for calculated or a for assumed.";

const BY_FIRST_LETTER: Readonly<Record<string, ProvenanceKind>> = {
  m: "measured", d: "from-drawing", f: "from-drawing", c: "calculated", a: "assumed",
};

/** One letter is enough; a whole word must be one of the four. An empty cell means "from drawing". */
export function parseProvenance(text: string): EntryResult<ProvenanceKind> {
  const word = text.trim().toLowerCase().replace(/[\s-]+/g, " ");
  if (word === "") return understood("from-drawing", PROVENANCE_LABEL["from-drawing"]);
  const kind = BY_FIRST_LETTER[word.charAt(0)];
  if (!kind) return refused(PROVENANCE_HINT);
  const label = PROVENANCE_LABEL[kind];
  const known = word.length === 1 || label.startsWith(word) || (kind === "from-drawing" && "drawing".startsWith(word));
  return known ? understood(kind, label) : refused(PROVENANCE_HINT);
}
