"use client";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { TextArea } from "@/components/ui/field";
import { countText } from "@/components/ui/format";
import { useToast } from "@/components/ui/notice";
import { blockOf, isBlock } from "./block";
import { useEditor } from "./editor-context";
import type { EditorState } from "./editor-types";

/** What may be done to the block, for a hand without a keyboard; shown while more than one cell is picked out. */
export function BlockBar({ state }: { readonly state: EditorState }) {
  const { send, readOnly, blockText } = useEditor();
  const [pasting, setPasting] = useState(false);
  const say = useToast();
  if (!isBlock(state)) return null;
  const block = blockOf(state);
  const { cursor } = state;
  const rows = block.toRow - block.fromRow + 1;
  const last = (state.document.runs.find((run) => run.id === block.runId)?.points.length ?? 1) - 1;
  const copy = async (): Promise<boolean> => {
    const done = await navigator.clipboard?.writeText(blockText() ?? "").then(() => true, () => false);
    say(done ? "Copied." : "This browser does not let the page copy: use its own copy key.", done ? "done" : "trouble");
    return done === true;
  };
  const few = [
    ["Copy", () => void copy()] as const,
    ...(readOnly ? [] : ([
      ["Cut", () => void copy().then((done) => done && send({ type: "cut" }))],
      ["Paste", () => setPasting(true)],
      ["Fill down", () => send({ type: "fill", series: false })],
      ["Fill series", () => send({ type: "fill", series: true })],
      ["Empty", () => send({ type: "clear" })],
      ["Rows above", () => send({ type: "row-insert", target: cursor })],
      ["Double", () => send({ type: "row-double", target: cursor })],
      ["Up", () => send({ type: "row-move", target: cursor, by: -1 })],
      ["Down", () => send({ type: "row-move", target: cursor, by: 1 })],
      ["Remove rows", () => send({ type: "row-remove", target: cursor })],
    ] as const)),
    ["One more row", () => send({ type: "stretch", target: { ...cursor, row: Math.min(last, cursor.row + 1) }, rows: block.rows })] as const,
    ["Let go", () => send({ type: "let-go" })] as const,
  ];
  return (
    <div role="toolbar" aria-label="Cells picked out" data-screen-only className="flex flex-wrap items-center gap-1 border border-b-0 border-dye bg-dye-tint px-2 py-1 text-sm max-sm:sticky max-sm:top-0 max-sm:z-20 max-sm:border-b">
      <span className="mr-2 font-medium">{block.rows ? countText(rows, "row") : countText(rows * (block.toColumn - block.fromColumn + 1), "cell")}</span>
      {few.map(([label, does]) => (
        <button key={label} type="button" onClick={does} className="min-h-9 border border-rule bg-sheet px-2 hover:border-dye max-sm:min-h-11 max-sm:px-3">
          {label}
        </button>
      ))}
      <Dialog open={pasting} onClose={() => setPasting(false)} title="Paste rows">
        <PasteForm
          onPaste={(text) => {
            send({ type: "paste", target: cursor, text });
            setPasting(false);
          }}
        />
      </Dialog>
    </div>
  );
}

function PasteForm({ onPaste }: { readonly onPaste: (text: string) => void }) {
  const [text, setText] = useState("");
  return (
    <>
      <TextArea figure label="Lines from a spreadsheet" hint="Move, Item, Joint, Source, Note with tabs between them; three numbers in front are east, north, up." rows={8} value={text} onChange={(event) => setText(event.target.value)} />
      <DialogActions>
        <Button tone="primary" disabled={text.trim() === ""} onClick={() => onPaste(text)}>Paste them in</Button>
      </DialogActions>
    </>
  );
}
