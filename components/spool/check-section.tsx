"use client";
import { useMemo, useState } from "react";
import { benchChecks, checkAnswer, formatFraction, formatTapeLength, parseLength, sheetFacts, type CheckAnswer, type CheckRow, type Model, type SheetInput } from "@/iso";
import { Button } from "@/components/ui/button";
import { apiSend, refreshApi } from "@/components/ui/fetcher";
import { useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import type { SpoolDetail, WorkEntry } from "@/lib/rules/api-types";

const KEY = "check:";

/** An actual that was entered at a check dimension. */
export const isCheckEntry = (entry: WorkEntry): boolean => entry.kind === "actual" && entry.key.startsWith(KEY);

export interface CheckSectionProps {
  readonly spool: SpoolDetail;
  readonly input: SheetInput;
  readonly model: Model;
  /** Whether what is measured may be recorded against this sheet. */
  readonly open: boolean;
}

/** The bench page's check dimensions: what was measured goes in, and the answer is go, trim this much, or stop. */
export function CheckSection({ spool, input, model, open }: CheckSectionProps) {
  const rows = useMemo(() => benchChecks(sheetFacts(input, model)), [input, model]);
  if (rows.length === 0) return null;
  return (
    <Section title="Check dimensions">
      <p className="mb-2 text-soft">
        Judged against PFI ES-3 tolerances, shop work, not cumulative. Verify by tape, two readings; do not pull, jack or heat to fit.
      </p>
      <table role="table" data-stack className="ruled">
        <caption className="sr-only">Check dimensions</caption>
        <thead role="rowgroup">
          <tr role="row">
            {["No.", "Between", "Wanted", "Actual", "Answer"].map((head) => (
              <th key={head} role="columnheader" scope="col">{head}</th>
            ))}
          </tr>
        </thead>
        <tbody role="rowgroup">
          {rows.map((row) => (
            <CheckLine key={row.key} row={row} input={input} spoolId={spool.id} open={open} entries={spool.work.filter((entry) => entry.key === KEY + row.key)} />
          ))}
        </tbody>
      </table>
    </Section>
  );
}

interface CheckLineProps {
  readonly row: CheckRow;
  readonly input: SheetInput;
  readonly spoolId: string;
  readonly open: boolean;
  readonly entries: readonly WorkEntry[];
}

function CheckLine({ row, input, spoolId, open, entries }: CheckLineProps) {
  const { units } = input;
  const [text, setText] = useState("");
  const read = text.trim() === "" ? null : parseLength(text, units);
  const answer = read?.ok ? checkAnswer(row, read.mm, units) : null;
  const name = `${row.mark} ${row.group} ${row.what}`;
  return (
    <tr role="row">
      <td role="cell" data-label="No." className="figure font-medium">{row.mark}</td>
      <td role="cell" data-label="Between">
        <span>
          {row.group}, <strong>{row.what}</strong>
          <span className="block text-sm text-soft">{row.how}</span>
        </span>
      </td>
      <td role="cell" data-label="Wanted" className="figure whitespace-nowrap">
        <span>
          <strong>{formatTapeLength(row.wantedMm, units)}</strong>
          <span className="block text-sm">+/- {formatFraction(row.toleranceMm, units)}</span>
        </span>
      </td>
      <td role="cell" data-label="Actual">
        <span>
          <input
            type="text" autoComplete="off" aria-label={`Actual of ${name}`} aria-invalid={read !== null && !read.ok}
            className="figure min-h-11 w-36 border border-ink bg-sheet px-2" value={text} onChange={(event) => setText(event.target.value)}
          />
          {read && !read.ok ? <span className="block text-sm text-alert">{read.message}</span> : null}
          {read?.ok ? <span className="block text-sm text-soft">read as {read.understood}</span> : null}
        </span>
      </td>
      <td role="cell" data-label="Answer">
        <div className="space-y-2" aria-live="polite">
          {answer ? <Answer answer={answer} /> : null}
          {answer && open ? <Record row={row} spoolId={spoolId} text={text} answer={answer} onDone={() => setText("")} /> : null}
          {entries.map((entry) => (
            <p key={entry.id} className="text-sm">
              <strong className="figure">{entry.values.actual}</strong> {entry.values.remarks}
              <span className="block text-soft">{entry.by}, rev {entry.revisionCode}</span>
            </p>
          ))}
        </div>
      </td>
    </tr>
  );
}

const TONES: Readonly<Record<CheckAnswer["verdict"], string>> = {
  go: "border-ink", trim: "border-caution text-caution", stop: "border-alert text-alert",
};

function Answer({ answer }: { readonly answer: CheckAnswer }) {
  return <p className={`border-l-4 pl-2 font-medium ${TONES[answer.verdict]}`}>{answer.words}</p>;
}

/** Longest text an entry's field holds. */
const MOST = 200;

function Record({ row, spoolId, text, answer, onDone }: { readonly row: CheckRow; readonly spoolId: string; readonly text: string; readonly answer: CheckAnswer; readonly onDone: () => void }) {
  const say = useToast();
  const [busy, setBusy] = useState(false);
  const record = async (): Promise<void> => {
    setBusy(true);
    try {
      await apiSend("POST", `/api/spools/${spoolId}/work`, {
        kind: "actual", mark: `${row.mark} ${row.what}`, key: KEY + row.key, values: { actual: text, remarks: answer.words.slice(0, MOST) },
      });
      await refreshApi("/api/spools", "/api/bench");
      say(`${row.mark} recorded.`);
      onDone();
    } catch (error) {
      say(error instanceof Error ? error.message : "It was not recorded. Try again.");
    } finally {
      setBusy(false);
    }
  };
  return (
    <Button busy={busy} busyLabel="Recording" onClick={() => void record()} aria-label={`Record the actual of ${row.mark}`}>
      Record
    </Button>
  );
}
