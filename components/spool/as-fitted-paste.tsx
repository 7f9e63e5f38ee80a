"use client";
import { useState } from "react";
import { pasteFitted, type FittedPoint, type ReadAs } from "@/iso";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { Select, TextArea } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { READ_AS_OPTIONS } from "./as-fitted-points";

const MOST_ROWS = 200;

/** Points as rows of name, E, N and U, from an instrument's file or a spreadsheet. They take the place of what was typed. */
export function AsFittedPaste({ open, readAs, freshId, onClose, onTake }: { readonly open: boolean; readonly readAs: ReadAs; readonly freshId: () => string; readonly onClose: () => void; readonly onTake: (points: readonly FittedPoint[], readAs: ReadAs) => void }) {
  const [text, setText] = useState("");
  const [unit, setUnit] = useState(readAs);
  const [refused, setRefused] = useState<readonly string[]>([]);
  const take = () => {
    const pasted = pasteFitted(text, unit, Array.from({ length: MOST_ROWS }, freshId));
    setRefused(pasted.refused);
    if (pasted.points.length === 0) return;
    onTake(pasted.points, unit);
    setText("");
    if (pasted.refused.length === 0) onClose();
  };
  return (
    <Dialog open={open} onClose={onClose} title="Paste measured points">
      <Select label="A number without a unit is in" options={READ_AS_OPTIONS} value={unit} onChange={(event) => setUnit(event.target.value as ReadAs)} />
      <TextArea
        className="mt-3" label="Rows" figure rows={8} value={text} onChange={(event) => setText(event.target.value)}
        hint="name, E, N, U. Names: 1 for the centre of end 1, 1 axis for a point along its pipe, 1 hole for a bolt hole, W2 for a corner."
      />
      {refused.length > 0 ? <Notice tone="trouble" className="mt-3">{refused.slice(0, 5).join(" ")}</Notice> : null}
      <DialogActions>
        <Button tone="primary" disabled={text.trim() === ""} onClick={take}>Take these points</Button>
      </DialogActions>
    </Dialog>
  );
}
