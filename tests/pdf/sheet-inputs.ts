/** Sheet inputs of the sample runs, and their painted bytes, for tests of paper. */
import { buildModel, composeSheet, emptyMarks, type RevisionState, type SheetInput, type SheetPage, type SheetSize } from "@/iso";
import { measureText } from "@/fonts/widths";
import { paintSheet } from "@/pdf/paint-sheet";
import { sampleRuns } from "../fixtures/sample-runs";
import { stubInput } from "../iso/sheet/sheet-stubs";

export const sampleNames: readonly string[] = Object.keys(sampleRuns);

export function sampleInput(name: string, size: SheetSize, state: RevisionState): SheetInput {
  const document = sampleRuns[name]!;
  const spool = buildModel(document, emptyMarks(), []).spools[0]!.letter;
  return { ...stubInput(size, state, document), marks: emptyMarks(), spool };
}

export async function paintedSample(name: string, size: SheetSize, state: RevisionState): Promise<{ input: SheetInput; pages: SheetPage[]; bytes: Uint8Array }> {
  const input = sampleInput(name, size, state);
  const pages = composeSheet(input, measureText);
  return { input, pages, bytes: await paintSheet({ pages, issuedAt: input.revision.issuedAt, title: `${input.document.number} spool ${input.spool}`, logo: null }) };
}
