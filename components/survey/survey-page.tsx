"use client";
import { useEffect, useMemo, useState } from "react";
import { surveyResult, type SurveyDocument, type SurveyResult } from "@/iso";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/progress";
import { TextArea } from "@/components/ui/field";
import { TitleStrip } from "@/components/ui/title-strip";
import { EndCard } from "./end-card";
import { keepForOffline } from "./offline";
import { PasteDialog } from "./paste-dialog";
import { PhotoPanel } from "./photo-panel";
import { ReadingCard } from "./reading-card";
import { ResultPanel } from "./result-panel";
import { newEnd, newReading, READING_KINDS, rowText, withEnd, withoutRow, withReading } from "./survey-edit";
import { syncWords } from "./survey-sync";
import { useSurvey, type OpenSurvey } from "./use-survey";

/** The survey of a line: readings under the thumb, the answer under them, kept on the device whatever the signal does. */
export function SurveyPage({ lineId }: { readonly lineId: string }) {
  const loading = useSurvey(lineId);
  useEffect(() => keepForOffline(), []);
  if (loading.kind === "loading") {
    return (
      <>
        <h1 className="sr-only">Opening the survey</h1>
        <Skeleton lines={8} label="Opening the survey" />
      </>
    );
  }
  if (loading.kind === "failed") {
    return (
      <>
        <h1 className="sr-only">Not shown</h1>
        <Notice tone="trouble" word="Not shown">{loading.message}</Notice>
      </>
    );
  }
  return <Survey survey={loading.survey} />;
}

/** Pause between keys after which the adjustment is worked out anew, ms: typing never waits for it. */
const QUIET_MS = 350;

/** The value once it has stood still for a moment. */
function useQuiet<T>(value: T): T {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), QUIET_MS);
    return () => clearTimeout(timer);
  }, [value]);
  return settled;
}

const freshId = () => crypto.randomUUID().replace(/-/g, "").slice(0, 20);
const MARKS_ID = "survey-marks";

function Survey({ survey }: { readonly survey: OpenSurvey }) {
  const { detail, view, change } = survey;
  const { document } = view;
  const settled = useQuiet(document);
  const result = useMemo(() => surveyResult(settled, detail.odMm), [settled, detail.odMm]);
  const [pasting, setPasting] = useState(false);
  const remarksOf = (id: string) => result.findings.filter((each) => each.tone !== "note" && each.readingIds.length === 1 && each.readingIds[0] === id).map((each) => each.sentence);
  return (
    <div className="mx-auto max-w-5xl">
      <TitleStrip kind="Survey" title={detail.line.number} trail={[{ href: `/jobs/${detail.job.id}`, label: detail.job.number }, ...(survey.readsLine ? [{ href: `/lines/${detail.line.id}`, label: detail.line.number }] : [])]} />
      <SyncLine survey={survey} />
      <Conflicts survey={survey} />
      <datalist id={MARKS_ID}>{result.marks.map(({ name }) => <option key={name} value={name} />)}</datalist>
      <div className="grid items-start gap-6 lg:grid-cols-2">
        <section aria-label="Readings">
          <h2 className="mb-2">Readings</h2>
          {document.readings.length === 0 ? <p className="mb-3 text-soft">Name a mark at each spot (A, B, C) and enter what was read between them. Three tapes, or two and a level reading, hold a mark.</p> : null}
          <ol className="space-y-3">
            {document.readings.map((reading, at) => (
              <ReadingCard
                key={reading.id} reading={reading} number={at + 1} marksId={MARKS_ID} remarks={remarksOf(reading.id)}
                result={result.readings.find((each) => each.readingId === reading.id) ?? null}
                onChange={(next) => change(withReading(document, next))} onRemove={() => change(withoutRow(document, reading.id))}
              />
            ))}
          </ol>
          <div className="sticky bottom-0 -mx-1 mt-3 flex flex-wrap gap-2 border-t border-ink bg-paper px-1 py-2">
            {READING_KINDS.map(({ kind, label }) => (
              <Button key={kind} aria-label={`Add ${label.toLowerCase()}`} onClick={() => change(withReading(document, newReading(freshId(), kind, document.readings[document.readings.length - 1])))}>
                + {label}
              </Button>
            ))}
            <Button tone="quiet" onClick={() => setPasting(true)}>Paste points</Button>
          </div>
        </section>
        <div className="space-y-6">
          <Ends document={document} result={result} change={change} remarksOf={remarksOf} />
          <ResultPanel result={result} units={document.units} lineId={survey.readsLine ? detail.line.id : null} />
          <PhotoPanel survey={survey} />
          <TextArea label="Note" maxLength={2000} value={document.note} onChange={(event) => change({ ...document, note: event.target.value })} />
        </div>
      </div>
      <PasteDialog open={pasting} units={document.units} freshId={freshId} onClose={() => setPasting(false)} onTake={(readings) => change({ ...document, readings: [...document.readings, ...readings] })} />
    </div>
  );
}

function Ends({ document, result, change, remarksOf }: { readonly document: SurveyDocument; readonly result: SurveyResult; readonly change: (document: SurveyDocument) => void; readonly remarksOf: (id: string) => string[] }) {
  return (
    <section aria-label="Ends">
      <h2 className="mb-2">Pipe ends</h2>
      <ul className="space-y-3">
        {document.ends.map((end) => (
          <EndCard key={end.id} end={end} units={document.units} marksId={MARKS_ID} remarks={remarksOf(end.id)} result={result.ends.find((each) => each.id === end.id) ?? null} onChange={(next) => change(withEnd(document, next))} onRemove={() => change(withoutRow(document, end.id))} />
        ))}
      </ul>
      <div className="mt-3 flex flex-wrap gap-2">
        <Button onClick={() => change(withEnd(document, newEnd(freshId(), document.ends.length)))}>+ End</Button>
      </div>
    </section>
  );
}

function SyncLine({ survey: { view, sendNow } }: { readonly survey: OpenSurvey }) {
  const { word } = view;
  const tone = word.kind === "not-kept" || word.kind === "conflict" ? "font-medium text-alert" : word.kind === "saved" ? "text-good" : "text-caution";
  return (
    <p role="status" className="mb-4 flex flex-wrap items-center gap-x-4">
      <span className={tone}>{syncWords(word)}</span>
      {word.kind === "kept" ? <Button tone="quiet" onClick={sendNow}>Send now</Button> : null}
    </p>
  );
}

/** Row by row: both values and a choice. */
function Conflicts({ survey: { view, choose } }: { readonly survey: OpenSurvey }) {
  if (view.conflicts.length === 0) return null;
  return (
    <section aria-label="Changed by two" className="mb-6 border-2 border-alert bg-sheet p-3">
      <h2>Changed on two devices</h2>
      <ul className="mt-2 space-y-4">
        {view.conflicts.map((conflict) => (
          <li key={`${conflict.list}${conflict.id}`} className="grid gap-2 sm:grid-cols-2">
            {(["mine", "theirs"] as const).map((side) => (
              <div key={side} className="border border-hair p-2">
                <p className="cell-label">{side === "mine" ? "On this device" : "On the server"}</p>
                <p className="figure break-words">{rowText(conflict[side])}</p>
                <Button className="mt-2" onClick={() => choose(conflict, side)}>{side === "mine" ? "Keep mine" : "Keep theirs"}</Button>
              </div>
            ))}
          </li>
        ))}
      </ul>
    </section>
  );
}
