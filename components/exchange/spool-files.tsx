"use client";
import { useMemo, useState } from "react";
import { composeSheet, type SheetInput } from "@/iso";
import { measureText } from "@/fonts/widths";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { FileLink, FileRow, ListRows, type Of } from "./export-links";

export interface SpoolFilesProps {
  readonly spoolId: string;
  /** The sheet shown. */
  readonly input: SheetInput;
  readonly issued: boolean;
}

/** Opens the files of the sheet shown: its lists and its pages as drawings. */
export function SpoolFilesButton(props: SpoolFilesProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>Take files out</Button>
      <Dialog open={open} onClose={() => setOpen(false)} title={`Files of spool ${props.input.spool}`}>
        <SpoolFiles {...props} />
      </Dialog>
    </>
  );
}

function SpoolFiles({ spoolId, input, issued }: SpoolFilesProps) {
  const sheets = useMemo(() => composeSheet(input, measureText).length, [input]);
  const of: Of = issued ? "issued" : "draft";
  const path = `/api/spools/${spoolId}/export`;
  const scope = issued ? `of rev ${input.revision.code}` : "as it is now";
  return (
    <>
      <p className="mb-3 text-soft">
        {issued ? `Of the issued sheet, rev ${input.revision.code}; each file says so.` : "Of the spool as it is now; the name of each file and its rows say DRAFT."} Each is an uncontrolled copy.
      </p>
      <ul>
        <ListRows path={path} of={of} scope={scope} />
        {Array.from({ length: sheets }, (_, index) => index + 1).map((sheet) => (
          <FileRow key={sheet} name={sheets === 1 ? "The sheet as a drawing" : `Sheet ${sheet} of ${sheets} as a drawing`}>
            {(["svg", "dxf"] as const).map((as) => (
              <FileLink key={as} href={`${path}?what=drawing&as=${as}&of=${of}&sheet=${sheet}&size=${input.size}`} label={as.toUpperCase()} about={`Sheet ${sheet} ${scope}`} />
            ))}
          </FileRow>
        ))}
      </ul>
      <p className="mt-3 text-sm text-soft">Drawings are in millimetres on paper, not to scale. The shop&apos;s logo is not in them.</p>
    </>
  );
}
