"use client";
import type { ChangeEvent } from "react";
import { formatAngleDeg, formatLength, type SurveyAxis, type SurveyEnd, type SurveyEndResult, type UnitSystem } from "@/iso";
import { Button } from "@/components/ui/button";
import { Select, TextField } from "@/components/ui/field";
import { directionText } from "@/components/run-editor/closing-form";
import { AXIS_KINDS, newAxis } from "./survey-edit";

export interface EndCardProps {
  readonly end: SurveyEnd;
  readonly result: SurveyEndResult | null;
  readonly remarks: readonly string[];
  readonly units: UnitSystem;
  readonly marksId: string;
  readonly onChange: (end: SurveyEnd) => void;
  readonly onRemove: () => void;
}

/** One pipe end: the mark at its centre, how its direction was found, and what comes of it. */
export function EndCard({ end, result, remarks, units, marksId, onChange, onRemove }: EndCardProps) {
  const axis = (part: Partial<SurveyAxis>) => onChange({ ...end, axis: { ...end.axis, ...part } as SurveyAxis });
  const facing = "points" in end.axis ? end.axis.points : "";
  return (
    <li aria-label={end.name || "End"} className="border border-hair bg-sheet p-3">
      <div className="grid grid-cols-2 gap-2">
        <TextField label="End" maxLength={24} value={end.name} onChange={(event) => onChange({ ...end, name: event.target.value })} />
        {end.axis.kind === "holes" ? null : <TextField label="Centre mark" figure list={marksId} value={end.centre} onChange={(event) => onChange({ ...end, centre: event.target.value })} />}
        <Select label="Direction from" className="col-span-2" options={AXIS_KINDS} value={end.axis.kind} onChange={(event) => onChange({ ...end, axis: newAxis(event.target.value as SurveyAxis["kind"], facing) })} />
        {"points" in end.axis ? <TextField label="Faces, out to the gap" className="col-span-2" figure placeholder="E, UN, 045/30" value={end.axis.points} onChange={(event) => axis({ points: event.target.value })} /> : null}
        <AxisFields axis={end.axis} marksId={marksId} onChange={axis} />
        <TextField label={end.axis.kind === "bearing" ? "Tolerance ± degrees" : "Tolerance ±"} figure placeholder="usual" value={end.tolerance} onChange={(event) => onChange({ ...end, tolerance: event.target.value })} />
      </div>
      {remarks.map((words) => (
        <p key={words} className="mt-2 font-medium text-alert">
          {words}
        </p>
      ))}
      {result ? <EndWords result={result} units={units} /> : null}
      <Button tone="quiet" aria-label={`Remove ${end.name || "end"}`} onClick={onRemove}>
        Remove
      </Button>
    </li>
  );
}

function EndWords({ result, units }: { readonly result: SurveyEndResult; readonly units: UnitSystem }) {
  const [e, n, u] = result.position.map((mm) => formatLength(mm, units));
  return (
    <dl className="mt-3 grid grid-cols-2 gap-x-4 gap-y-1 border-t border-ink pt-2">
      <dt className="cell-label">E, N, U</dt>
      <dd className="figure">{e}, {n}, {u}</dd>
      <dt className="cell-label">Known within</dt>
      <dd className="figure">{formatLength(result.positionWithinMm, units)}{units === "metric" ? " mm" : ""}</dd>
      <dt className="cell-label">Axis, to the gap</dt>
      <dd className="figure">{shortDirection(result.axis)}</dd>
      <dt className="cell-label">Known within</dt>
      <dd className="figure">{formatAngleDeg(result.axisWithinRad)}</dd>
    </dl>
  );
}

/** Direction to a hundredth of a degree, as one reads it; the exact one goes into the closing. */
function shortDirection(axis: SurveyEndResult["axis"]): string {
  return directionText(axis).replace(/(\d+\.\d{2})\d+/g, "$1");
}

const CLOCK = ["12 o'clock", "3 o'clock", "6 o'clock", "9 o'clock"];

function AxisFields({ axis, marksId, onChange }: { readonly axis: SurveyAxis; readonly marksId: string; readonly onChange: (part: Partial<SurveyAxis>) => void }) {
  const typed = (set: (text: string) => Partial<SurveyAxis>) => (event: ChangeEvent<HTMLInputElement>) => onChange(set(event.target.value));
  switch (axis.kind) {
    case "bearing": return null;
    case "line": return <TextField label="Mark behind the face" figure list={marksId} value={axis.back} onChange={typed((back) => ({ back }))} />;
    case "level": return (
      <>
        <TextField label="Upright: top leans back" figure value={axis.uprightLean} onChange={typed((uprightLean) => ({ uprightLean }))} />
        <TextField label="over" figure placeholder="length of the level" value={axis.uprightSpan} onChange={typed((uprightSpan) => ({ uprightSpan }))} />
        <TextField label="Level: right edge leans back" figure value={axis.levelLean} onChange={typed((levelLean) => ({ levelLean }))} />
        <TextField label="over" figure placeholder="length of the level" value={axis.levelSpan} onChange={typed((levelSpan) => ({ levelSpan }))} />
      </>
    );
    case "face": return (
      <>
        <TextField label="On a circle of Ø" className="col-span-2" hint="distances from the face to a plane square to its direction" figure value={axis.circle} onChange={typed((circle) => ({ circle }))} />
        {CLOCK.map((label, at) => (
          <TextField key={label} label={label} figure value={axis.distances[at] ?? ""} onChange={typed((text) => ({ distances: axis.distances.map((each, i) => (i === at ? text : each)) }))} />
        ))}
      </>
    );
    case "holes": return <HoleField key={axis.kind} marks={axis.marks} onChange={(marks) => onChange({ marks })} />;
  }
}

function HoleField({ marks, onChange }: { readonly marks: readonly string[]; readonly onChange: (marks: string[]) => void }) {
  return <TextField label="Marks at bolt holes" className="col-span-2" hint="three or more, with commas between" figure value={marks.join(",")} onChange={(event) => onChange(event.target.value.split(",").map((each) => each.slice(0, 24)).slice(0, 12))} />;
}
