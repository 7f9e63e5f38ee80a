"use client";
import type { Model } from "@/iso";
import { Section } from "@/components/ui/section";
import type { LineDetail } from "@/lib/rules/api-types";
import { CutStrip } from "./cut-strip";
import { ProblemList, type ProblemListProps } from "./problem-list";
import { SpoolSummary } from "./spool-summary";
import { UploadPanel } from "./upload-panel";

export interface FindingPanelsProps extends Pick<ProblemListProps, "waiting" | "onPoint" | "onCell"> {
  readonly line: LineDetail;
  readonly model: Model;
  readonly activePointId: string | null;
  readonly onUploads: () => Promise<unknown>;
}

/** What follows from the run: findings, cut list, spools; and the sketches it was read from. */
export function FindingPanels({ line, model, waiting, activePointId, onPoint, onCell, onUploads }: FindingPanelsProps) {
  return (
    <div className="mt-5">
      <Section title="Cut list">
        <CutStrip model={model} activePointId={activePointId} onPoint={onPoint} />
      </Section>
      <Section title="Findings">
        <ProblemList document={model.document} problems={model.problems} waiting={waiting} onPoint={onPoint} onCell={onCell} />
      </Section>
      <Section title="Spools">
        <SpoolSummary model={model} spools={line.spools} />
      </Section>
      <Section title="Sketches and photos">
        <UploadPanel lineId={line.id} uploads={line.uploads} editable={line.editable} onChanged={onUploads} />
      </Section>
    </div>
  );
}
