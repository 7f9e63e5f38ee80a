"use client";
import { memo } from "react";
import type { Model } from "@/iso";
import { Section } from "@/components/ui/section";
import type { LineDetail } from "@/lib/rules/api-types";
import { CutStrip } from "./cut-strip";
import { ProblemList, type ProblemListProps } from "./problem-list";
import { SpoolSummary } from "./spool-summary";
import { UploadPanel } from "./upload-panel";

export interface FindingPanelsProps extends Pick<ProblemListProps, "waiting" | "activePointId" | "onPoint" | "onCell"> {
  readonly line: LineDetail;
  readonly model: Model;
  readonly onUploads: () => Promise<unknown>;
}

/** What is wrong or to be looked at; and the sketches the run was read from. */
export const FindingPanels = memo(function FindingPanels({ line, model, waiting, activePointId, onPoint, onCell, onUploads }: FindingPanelsProps) {
  return (
    <>
      <Section title="Findings">
        <ProblemList document={model.document} problems={model.problems} waiting={waiting} activePointId={activePointId} onPoint={onPoint} onCell={onCell} />
      </Section>
      <Section title="Sketches and photos">
        <UploadPanel lineId={line.id} uploads={line.uploads} editable={line.editable} onChanged={onUploads} />
      </Section>
    </>
  );
});

export interface CutPanelsProps {
  readonly line: LineDetail;
  readonly model: Model;
  readonly activePointId: string | null;
  readonly onPoint: (pointId: string) => void;
}

/** What follows from the run for the bench: pieces to cut, spools to carry. */
export const CutPanels = memo(function CutPanels({ line, model, activePointId, onPoint }: CutPanelsProps) {
  return (
    <>
      <Section title="Cut list" className="mb-8 [contain-intrinsic-size:auto_40rem] [content-visibility:auto]">
        <CutStrip model={model} activePointId={activePointId} onPoint={onPoint} />
      </Section>
      <Section title="Spools">
        <SpoolSummary model={model} spools={line.spools} />
      </Section>
    </>
  );
});
