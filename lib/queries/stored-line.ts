/** A line's stored text read back as values. It was checked when it was saved, so what does not read is a fault. */
import { emptyMarks, parseRunDocument, type MarksRegister, type RunDocument } from "@/iso";
import type { Line } from "@/models";

/** @throws Error when the stored text is no run document. */
export function storedDocument(line: Pick<Line, "id" | "document">): RunDocument {
  const parsed = parseRunDocument(JSON.parse(line.document));
  if (!parsed.ok) throw new Error(`The stored document of line ${line.id} does not read.`);
  return parsed.document;
}

export function storedMarks(line: Pick<Line, "marks">): MarksRegister {
  return line.marks === "" ? emptyMarks() : (JSON.parse(line.marks) as MarksRegister);
}
