"use client";
import type { ChangeEvent } from "react";
import { SURVEY_TOOLS, surveyToolSchema, type SurveyReading, type SurveyReadingResult } from "@/iso";
import { Button } from "@/components/ui/button";
import { Select, TextField } from "@/components/ui/field";
import { READING_KINDS } from "./survey-edit";

export interface ReadingCardProps {
  readonly reading: SurveyReading;
  readonly number: number;
  readonly result: SurveyReadingResult | null;
  /** Remarks about this reading alone. */
  readonly remarks: readonly string[];
  readonly marksId: string;
  readonly onChange: (reading: SurveyReading) => void;
  readonly onRemove: () => void;
}

const TOOLS = surveyToolSchema.options.map((value) => ({ value, label: SURVEY_TOOLS[value].words }));
const AXES = ["E", "N", "U"] as const;
/** Redundancy number under which the others hardly check a reading: an error of it shows to a fiftieth. */
const HARDLY = 0.02;

function hardlyChecked({ off, redundancy }: SurveyReadingResult): boolean {
  return !off && redundancy > 0 && redundancy < HARDLY;
}

/** One reading: which marks, what was read, once and again. Made for a thumb at 390 px. */
export function ReadingCard({ reading, number, result, remarks, marksId, onChange, onRemove }: ReadingCardProps) {
  const kind = READING_KINDS.find((each) => each.kind === reading.kind)?.label ?? "";
  const set = (field: "from" | "to" | "tolerance" | "note" | "tool") => (event: ChangeEvent<HTMLInputElement | HTMLSelectElement>) => onChange({ ...reading, [field]: event.target.value } as SurveyReading);
  const told = remarks.length > 0 || result?.off;
  return (
    <li aria-label={`Reading ${number}, ${kind}`} className={`border bg-sheet p-3 ${told ? "border-alert border-l-4" : "border-hair"} ${reading.leftOut ? "opacity-70" : ""}`}>
      <div className="flex items-baseline justify-between gap-3">
        <h3>
          {number}. {kind}{reading.leftOut ? ", left out" : ""}
        </h3>
        <p className={`text-right text-sm ${result?.off ? "font-medium text-alert" : "text-soft"}`}>
          {result ? result.words + (hardlyChecked(result) ? ", hardly checked" : "") : ""}
        </p>
      </div>
      <div className="mt-2 grid grid-cols-2 gap-2">
        {reading.kind === "point" ? null : <TextField label={reading.kind === "offset" ? "From, blank = datum" : "From mark"} figure list={marksId} value={reading.from} onChange={set("from")} autoCapitalize="characters" />}
        <TextField label={reading.kind === "point" ? "Mark" : "To mark"} figure list={marksId} value={reading.to} onChange={set("to")} autoCapitalize="characters" />
      </div>
      <div className={reading.first.length === 3 ? "" : "grid grid-cols-2 items-end gap-2"}>
        <Values label={reading.kind === "bearing" ? "Direction" : "Reading"} texts={reading.first} onChange={(first) => onChange({ ...reading, first })} placeholder={reading.kind === "bearing" ? "045/30, N30E" : undefined} />
        <Values label="Again" texts={reading.again} onChange={(again) => onChange({ ...reading, again })} />
      </div>
      {remarks.map((words) => (
        <p key={words} className="mt-2 font-medium text-alert">
          {words}
        </p>
      ))}
      <details className="mt-2">
        <summary className="min-h-11 py-2 text-sm text-dye">Tool and tolerance: {SURVEY_TOOLS[reading.tool].words.toLowerCase()}{reading.tolerance ? `, ± ${reading.tolerance}` : ""}</summary>
        <div className="grid grid-cols-2 gap-2 pb-2">
          <Select label="Tool" options={TOOLS} value={reading.tool} onChange={set("tool")} />
          <TextField label="Tolerance ±" figure placeholder="the tool's" value={reading.tolerance} onChange={set("tolerance")} />
        </div>
        <TextField label="Note" value={reading.note} maxLength={200} onChange={set("note")} />
        <div className="mt-2 flex flex-wrap gap-4">
          <Button tone="quiet" onClick={() => onChange({ ...reading, leftOut: !reading.leftOut })}>
            {reading.leftOut ? "Use it again" : "Leave it out"}
          </Button>
          <Button tone="quiet" aria-label={`Remove reading ${number}`} onClick={onRemove}>
            Remove
          </Button>
        </div>
      </details>
    </li>
  );
}

function Values({ label, texts, placeholder, onChange }: { readonly label: string; readonly texts: readonly string[]; readonly placeholder?: string | undefined; readonly onChange: (texts: string[]) => void }) {
  const set = (at: number) => (event: ChangeEvent<HTMLInputElement>) => onChange(texts.map((text, i) => (i === at ? event.target.value : text)));
  return (
    <div className={`mt-2 grid gap-2 ${texts.length === 3 ? "grid-cols-3" : "grid-cols-1"}`}>
      {texts.map((text, at) => (
        <TextField key={at} label={texts.length === 3 ? `${label} ${AXES[at]}` : label} placeholder={placeholder} figure maxLength={60} value={text} onChange={set(at)} />
      ))}
    </div>
  );
}
