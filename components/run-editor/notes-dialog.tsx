"use client";
import type { RunDocument } from "@/iso";
import { Dialog } from "@/components/ui/dialog";
import { TextArea } from "@/components/ui/field";
import { linesOfNotes, notesOfSpool, withSpoolNotes } from "./sheet-notes";

export interface NotesDialogProps {
  readonly open: boolean;
  readonly document: RunDocument;
  /** Letters of the spools there are, in order. */
  readonly spools: readonly string[];
  readonly editable: boolean;
  readonly onChange: (patch: Partial<Pick<RunDocument, "notes" | "sheetNotes">>) => void;
  readonly onClose: () => void;
}

/** Notes of the whole line, and of each spool's sheet alone. A point's own note stands in its row. */
export function NotesDialog({ open, document, spools, editable, onChange, onClose }: NotesDialogProps) {
  const named = new Set([...spools, ...(document.sheetNotes ?? []).map((note) => note.spool)]);
  return (
    <Dialog open={open} onClose={onClose} title="Notes" wide>
      <div className="grid gap-5">
        <NoteArea label="On every sheet of the line" notes={document.notes} editable={editable} onNotes={(notes) => onChange({ notes: [...notes] })} />
        {[...named].map((spool) => (
          <NoteArea key={spool} label={`On the sheet of spool ${spool} only`} notes={notesOfSpool(document, spool)} editable={editable} onNotes={(notes) => onChange({ sheetNotes: withSpoolNotes(document, spool, notes) })} />
        ))}
        <p className="text-sm text-soft">A note of one point stands in its own row, in the column Note.</p>
      </div>
    </Dialog>
  );
}

interface NoteAreaProps {
  readonly label: string;
  readonly notes: readonly string[];
  readonly editable: boolean;
  readonly onNotes: (notes: readonly string[]) => void;
}

function NoteArea({ label, notes, editable, onNotes }: NoteAreaProps) {
  return (
    <TextArea
      label={label}
      hint="One note a line, at most 40."
      defaultValue={notes.join("\n")}
      readOnly={!editable}
      onBlur={(event) => {
        const next = linesOfNotes(event.target.value);
        if (next.join("\n") !== notes.join("\n")) onNotes(next);
      }}
    />
  );
}
