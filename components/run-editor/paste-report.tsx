"use client";
import { Button } from "@/components/ui/button";
import { countText } from "@/components/ui/format";
import { Notice } from "@/components/ui/notice";
import { COLUMN_LABEL } from "./grid-cell";
import { useEditor } from "./editor-context";
import type { PasteReport } from "./editor-types";

const MOST_SHOWN = 12;

/** What a paste took and, line by line, what it did not understand; the good lines are in already. */
export function PasteReportNotice({ report }: { readonly report: PasteReport | null }) {
  const { send } = useEditor();
  if (!report || report.refused.length === 0) return null;
  const { refused } = report;
  return (
    <Notice tone="caution" word="Pasted" className="mb-2">
      {countText(report.lines, "line")}; {countText(refused.length, "cell")} not understood. Each waits in its cell; all others are in.
      <ul className="mt-1 max-h-48 overflow-y-auto text-sm">
        {refused.slice(0, MOST_SHOWN).map(({ line, target, text, message }) => (
          <li key={`${line}${target.column}`}>
            <button type="button" className="py-0.5 text-left underline-offset-2 hover:underline max-sm:min-h-11" onClick={() => send({ type: "cursor", target, focus: true })}>
              Line {line}, {COLUMN_LABEL[target.column]}: <span className="figure">{text}</span>. {message}
            </button>
          </li>
        ))}
      </ul>
      {refused.length > MOST_SHOWN ? <p className="text-sm">And {refused.length - MOST_SHOWN} more: see the findings.</p> : null}
      <Button tone="quiet" onClick={() => send({ type: "report-read" })}>Put this away</Button>
    </Notice>
  );
}
