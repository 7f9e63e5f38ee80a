"use client";
import { useState } from "react";
import type { RunDocument } from "@/iso";
import { useEditor } from "@/components/run-editor/editor-context";
import { Button } from "@/components/ui/button";
import { ChoiceRow } from "@/components/ui/choice-row";
import { Dialog } from "@/components/ui/dialog";
import { useViewer } from "@/components/shell/use-viewer";
import type { LineDetail } from "@/lib/rules/api-types";
import { ImportView } from "./import-dialog";
import { LineFiles } from "./export-links";

type Side = "in" | "out";

/** Opens what brings points into the line and takes files out of it. */
export function ExchangeButton({ line, document }: { readonly line: LineDetail; readonly document: RunDocument }) {
  const { send, readOnly } = useEditor();
  const viewer = useViewer();
  const [open, setOpen] = useState(false);
  const [side, setSide] = useState<Side>(readOnly ? "out" : "in");
  const close = (): void => setOpen(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>In and out</Button>
      <Dialog open={open} onClose={close} title="In and out" wide>
        {readOnly ? null : (
          <div className="mb-5">
            <ChoiceRow<Side> label="Direction" value={side} onChange={setSide} choices={[{ value: "in", label: "Bring points in" }, { value: "out", label: "Take files out" }]} />
          </div>
        )}
        {side === "in" && !readOnly ? (
          <ImportView
            document={document}
            by={viewer.data?.name ?? ""}
            onImport={(next) => {
              send({ type: "document-patch", patch: { runs: next.runs } });
              close();
            }}
          />
        ) : (
          <LineFiles line={line} />
        )}
      </Dialog>
    </>
  );
}
