"use client";
import { useState } from "react";
import { isBranchFitting, lineInsert, type RunDocument } from "@/iso";
import { Button } from "@/components/ui/button";
import { apiGet, failureText, useApi } from "@/components/ui/fetcher";
import { Select } from "@/components/ui/field";
import type { JobDetail, LineDetail } from "@/lib/rules/api-types";
import { pointPlace, runOf } from "./document-edits";
import { freshId } from "./editor-ids";
import { itemEcho } from "./item-text";

export interface InsertLineProps {
  readonly line: LineDetail;
  readonly document: RunDocument;
  readonly pointId: string | null;
  readonly onDocument: (next: RunDocument) => void;
  readonly onTrouble: (message: string | null) => void;
}

type Way = "continue" | "branch";

/** Another line of the job put into this one: on from a run's end, or as a branch from a fitting. */
export function InsertLine({ line, document, pointId, onDocument, onTrouble }: InsertLineProps) {
  const job = useApi<JobDetail>(`/api/jobs/${line.job.id}`);
  const others = (job.data?.lines ?? []).filter((each) => each.id !== line.id);
  const [wanted, setWanted] = useState("");
  const [at, setAt] = useState(pointId ?? "");
  const [busy, setBusy] = useState(false);
  const places = placesFor(document);
  const place = places.find((each) => each.value === at) ?? places[0];
  const chosen = wanted || others[0]?.id || "";
  const insert = async (): Promise<void> => {
    if (!place) return;
    setBusy(true);
    onTrouble(null);
    try {
      const other = await apiGet<LineDetail>(`/api/lines/${chosen}`);
      const result = lineInsert(document, other.document, { as: place.way, pointId: place.value }, () => freshId("p"));
      if (result.ok) onDocument(result.document);
      else onTrouble(result.message);
    } catch (failure) {
      onTrouble(failureText(failure));
    }
    setBusy(false);
  };
  return (
    <section aria-label="Insert another line">
      <h3>Insert another line</h3>
      {others.length === 0 ? (
        <p className="text-sm text-soft">{job.data ? "The job has no other line." : "Reading the job's lines."}</p>
      ) : (
        <div className="mt-2 flex flex-wrap items-end gap-3">
          <Select label="Line" className="min-w-0 flex-1 basis-48" value={chosen} onChange={(event) => setWanted(event.target.value)} options={others.map((each) => ({ value: each.id, label: `${each.number} ${each.title}`.trim() }))} />
          <Select label="Goes in" className="min-w-0 flex-1 basis-48" value={place?.value ?? ""} onChange={(event) => setAt(event.target.value)} options={places} />
          <Button busy={busy} busyLabel="Inserting" disabled={!place} onClick={() => void insert()}>Insert it</Button>
        </div>
      )}
    </section>
  );
}

interface Place {
  readonly value: string;
  readonly label: string;
  readonly way: Way;
}

/** Ends of runs to go on from, fittings to branch from. */
function placesFor(document: RunDocument): readonly Place[] {
  const ends = document.runs.flatMap((run): Place[] => {
    const last = run.points[run.points.length - 1];
    return last ? [{ value: last.id, label: `on from ${rowWords(document, last.id)}`, way: "continue" }] : [];
  });
  const fittings = document.runs.flatMap((run) => run.points.filter((point) => isBranchFitting(point.item))).map((point): Place => ({
    value: point.id, label: `branch from ${rowWords(document, point.id)}, ${itemEcho(point.item)}`, way: "branch",
  }));
  return [...ends.filter((end) => !fittings.some((fitting) => fitting.value === end.value)), ...fittings];
}

function rowWords(document: RunDocument, pointId: string): string {
  const place = pointPlace(document, pointId);
  const run = place ? runOf(document, place.runId) : null;
  if (!place || !run) return "";
  return run === document.runs[0] ? `row ${place.row + 1}` : `row ${place.row + 1} of ${run.name || `branch ${document.runs.indexOf(run)}`}`;
}
