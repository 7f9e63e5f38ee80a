"use client";
import { useState } from "react";
import { pastePoints, type SurveyReading, type SurveyTool, type UnitSystem } from "@/iso";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { Select, TextArea } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";

const TOOLS = [
  { value: "total-station", label: "Total station, ± 2 mm" },
  { value: "tracker", label: "Laser tracker, ± 0.1 mm" },
];
const MOST_ROWS = 200;

/** Points as rows of name, E, N, U and sigma, pasted from the instrument's file. */
export function PasteDialog({ open, units, freshId, onClose, onTake }: { readonly open: boolean; readonly units: UnitSystem; readonly freshId: () => string; readonly onClose: () => void; readonly onTake: (readings: readonly SurveyReading[]) => void }) {
  const [text, setText] = useState("");
  const [tool, setTool] = useState<SurveyTool>("total-station");
  const [refused, setRefused] = useState<readonly string[]>([]);
  const take = () => {
    const pasted = pastePoints(text, units, tool, Array.from({ length: MOST_ROWS }, freshId));
    setRefused(pasted.refused);
    if (pasted.readings.length === 0) return;
    onTake(pasted.readings);
    setText("");
    if (pasted.refused.length === 0) onClose();
  };
  return (
    <Dialog open={open} onClose={onClose} title="Paste points">
      <Select label="Taken with" options={TOOLS} value={tool} onChange={(event) => setTool(event.target.value as SurveyTool)} />
      <TextArea className="mt-3" label="Rows" hint={`name, E, N, U, sigma (may be left out), in ${units === "metric" ? "mm" : "inches unless a unit is typed"}`} figure rows={8} value={text} onChange={(event) => setText(event.target.value)} />
      {refused.length > 0 ? <Notice tone="trouble" className="mt-3">{refused.slice(0, 5).join(" ")}</Notice> : null}
      <DialogActions>
        <Button tone="primary" disabled={text.trim() === ""} onClick={take}>Take these points</Button>
      </DialogActions>
    </Dialog>
  );
}
