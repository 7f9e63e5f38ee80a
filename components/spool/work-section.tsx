"use client";
import { useState } from "react";
import { formatInches, formatLength, type Joint, type Piece, type SheetInput } from "@/iso";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import type { Role, SpoolDetail, WorkKind } from "@/lib/rules/api-types";
import { canRecord } from "@/lib/rules/permissions";
import { AsFittedSection } from "./as-fitted-section";
import { CheckSection, isCheckEntry } from "./check-section";
import { CutPrint } from "./cut-print";
import { CutTable } from "./cut-table";
import { LogCell } from "./log-cell";
import { spoolFacts } from "./spool-facts";
import { WeldTable } from "./weld-table";
import { WorkDialog, type WorkTarget } from "./work-dialog";

export interface WorkSectionProps {
  readonly spool: SpoolDetail;
  /** The sheet shown: issued or as it would be now. */
  readonly input: SheetInput;
  readonly issued: boolean;
  readonly role: Role;
}

/** Cut list and welds of the sheet shown, each row with its log. Work is recorded against the issued sheet only. */
export function WorkSection({ spool, input, issued, role }: WorkSectionProps) {
  const [target, setTarget] = useState<WorkTarget | null>(null);
  const facts = spoolFacts(input);
  if (!facts) return null;
  const held =
    input.revision.hold ||
    spool.revisions.some((revision) => revision.id === spool.live?.revisionId && revision.hold);
  const closed = input.revision.state === "as-built";
  const open = issued && !held && !closed;
  const cell = (key: string, kinds: readonly WorkKind[], mark: string, about: string, field: boolean) => (
    <LogCell
      entries={spool.work.filter((entry) => entry.key === key)}
      kinds={kinds}
      role={role}
      open={open}
      markName={mark}
      onRecord={(kind) => setTarget({ spoolId: spool.id, kind, mark, key, about, field })}
    />
  );
  const pieceCell = (piece: Piece) =>
    cell(piece.key, ["cut"], piece.mark, `Cut length ${cutText(piece, input)}`, false);
  const weldCell = (weld: Joint) =>
    cell(
      weld.key,
      ["fit-up", "weld", "visual"],
      weld.number ?? "",
      `NPS ${weld.nps}, ${facts.nameOf(weld.a)} and ${facts.nameOf(weld.b)}`,
      weld.place !== "shop",
    );
  return (
    <>
      {issued && held ? (
        <Notice tone="caution" word="HOLD" className="mb-4">
          Nothing is recorded against a sheet on hold. An inspector or the owner releases it.
        </Notice>
      ) : null}
      {issued && closed ? (
        <Notice className="mb-4" word="AS-BUILT">
          This spool is closed; its log stays as it is.
        </Notice>
      ) : null}
      {issued ? null : (
        <Notice className="mb-4">
          This is what the sheet would be now. Work is recorded against an issued sheet.
        </Notice>
      )}
      <Section title="Cut list" aside={<CutPrint input={input} facts={facts} jobNumber={spool.job.number} />}>
        {facts.pieces.length === 0 ? (
          <p className="text-soft">This spool has no cut pipe.</p>
        ) : (
          <CutTable facts={facts} units={input.units} done={pieceCell} />
        )}
      </Section>
      <Section title="Welds">
        {facts.welds.length === 0 ? (
          <p className="text-soft">This spool has no weld.</p>
        ) : (
          <WeldTable facts={facts} done={weldCell} />
        )}
      </Section>
      <CheckSection spool={spool} input={input} model={facts.model} open={open && canRecord(role, "actual")} />
      <AsFittedSection spoolId={spool.id} input={input} model={facts.model} open={open && canRecord(role, "actual")} />
      <Actuals
        spool={spool}
        role={role}
        open={open}
        onRecord={() =>
          setTarget({ spoolId: spool.id, kind: "actual", mark: "", key: "", about: "", field: false })
        }
      />
      <WorkDialog target={target} onClose={() => setTarget(null)} />
    </>
  );
}

function cutText(piece: Piece, input: SheetInput): string {
  return input.units === "metric"
    ? `${formatLength(piece.cutLengthMm, input.units)} mm`
    : `${formatInches(piece.cutLengthMm)} in`;
}

function Actuals({
  spool,
  role,
  open,
  onRecord,
}: {
  readonly spool: SpoolDetail;
  readonly role: Role;
  readonly open: boolean;
  readonly onRecord: () => void;
}) {
  const entries = spool.work.filter((entry) => entry.kind === "actual" && !isCheckEntry(entry));
  return (
    <Section
      title="Other actual dimensions"
      aside={open && canRecord(role, "actual") ? <Button onClick={onRecord}>Record an actual</Button> : null}
    >
      {entries.length === 0 ? (
        <p className="text-soft">
          None recorded beside the check dimensions.
        </p>
      ) : (
        <ul>
          {entries.map((entry) => (
            <li key={entry.id} className="flex flex-wrap justify-between gap-x-6 border-b border-hair py-2">
              <span>
                {entry.mark} <strong className="figure">{entry.values.actual}</strong> {entry.values.remarks}
              </span>
              <span className="text-sm text-soft">
                {entry.by}, rev {entry.revisionCode}
              </span>
            </li>
          ))}
        </ul>
      )}
    </Section>
  );
}
