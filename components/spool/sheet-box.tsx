"use client";
import { useState } from "react";
import {
  composeBenchPages, composeCutMapPages, composeLegendPages, composeSheet, composeTemplatePages, composeWeldMapPages, type MeasureText, type SheetInput, type SheetPage,
} from "@/iso";
import { SheetPreview } from "@/components/sheet/sheet-preview";
import { ChoiceRow } from "@/components/ui/choice-row";

type Paper = "sheet" | "cuts" | "welds" | "bench" | "templates" | "legend";

const PAPERS: Readonly<Record<Paper, { readonly label: string; readonly pages: (input: SheetInput, measure: MeasureText) => readonly SheetPage[] }>> = {
  sheet: { label: "Sheet", pages: composeSheet },
  cuts: { label: "Cut map", pages: (input, measure) => composeCutMapPages(input, measure) },
  welds: { label: "Weld map", pages: (input, measure) => composeWeldMapPages(input, measure) },
  bench: { label: "Bench pages", pages: composeBenchPages },
  templates: { label: "Templates", pages: (input, measure) => composeTemplatePages(input, measure) },
  legend: { label: "Legend", pages: composeLegendPages },
};
const CHOICES = (Object.keys(PAPERS) as Paper[]).map((value) => ({ value, label: PAPERS[value].label }));

/** What prints of a spool, page by page. Records and stock are put on when it is printed. */
export function SheetBox({ input, line }: { readonly input: SheetInput; readonly line: string }) {
  const [paper, setPaper] = useState<Paper>("sheet");
  return (
    <>
      <div className="mb-2" data-screen-only>
        <ChoiceRow label="What prints" value={paper} onChange={setPaper} choices={CHOICES} />
      </div>
      <SheetPreview
        key={paper + input.revision.code + input.revision.state}
        input={input}
        pagesOf={PAPERS[paper].pages}
        label={`${PAPERS[paper].label} of line ${line}, spool ${input.spool}`}
      />
      {NOTES[paper] ? <p className="mt-2 text-sm text-soft">{NOTES[paper]}</p> : null}
    </>
  );
}

const NOTES: Readonly<Partial<Record<Paper, string>>> = {
  cuts: "What was recorded at the saw, and out of which stock each piece comes, is put on when it is printed.",
  welds: "What was recorded of each weld is put on when it is printed.",
  templates: "On screen these are pictures. The PDF prints at true scale: print it at 100 % and check the bar.",
};
