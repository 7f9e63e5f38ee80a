"use client";
import { useState } from "react";
import { composeBenchPages, composeSheet, composeTemplatePages, type MeasureText, type SheetInput, type SheetPage } from "@/iso";
import { SheetPreview } from "@/components/sheet/sheet-preview";
import { ChoiceRow } from "@/components/ui/choice-row";

type Paper = "sheet" | "bench" | "templates";

const PAPERS: Readonly<Record<Paper, { readonly label: string; readonly pages: (input: SheetInput, measure: MeasureText) => readonly SheetPage[] }>> = {
  sheet: { label: "Sheet", pages: composeSheet },
  bench: { label: "Bench pages", pages: composeBenchPages },
  templates: { label: "Templates", pages: composeTemplatePages },
};
const CHOICES = (Object.keys(PAPERS) as Paper[]).map((value) => ({ value, label: PAPERS[value].label }));

/** What prints of a spool, page by page: its sheet, its bench pages, its templates. */
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
      {paper === "templates" ? (
        <p className="mt-2 text-sm text-soft">On screen these are pictures. The PDF prints at true scale: print it at 100 % and check the bar.</p>
      ) : null}
    </>
  );
}
