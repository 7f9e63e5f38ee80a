"use client";
import { useDeferredValue, useMemo, useState, type ChangeEvent } from "react";
import { closeBetween, trimWords, type FitTrim, type Model, type Nps, type RunDocument, type TakeOutWord } from "@/iso";
import { FitPanel } from "@/components/fit/fit-panel";
import { withFieldFit } from "@/components/fit/take-trim";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { Select, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { lengthEntryText, NPS_OPTIONS } from "@/components/jobs/settings-text";
import { ClosingAnswer } from "./closing-answer";
import { EMPTY_END, endFromPoint, radiusHint, readClosingForm, sizeAfter, type ClosingForm, type EndForm, type FieldMessages } from "./closing-form";
import { ClosingWays } from "./closing-ways";
import { planInsert, type InsertStamp } from "./closing-insert";
import { pointPlace } from "./document-edits";
import { itemEcho } from "./item-text";
import { endFromSurvey, surveyedOptions, takenFrom, useSurveyedEnds, type SurveyedEndResult } from "./surveyed-ends";

export interface CloseDialogProps {
  readonly open: boolean;
  readonly model: Model;
  readonly takeOuts: readonly TakeOutWord[];
  /** Row to start from. */
  readonly pointId: string | null;
  readonly stamp: () => InsertStamp;
  /** Line whose surveyed ends may be taken; none without. */
  readonly lineId?: string;
  /** Surveyed ends to start from, as choices. */
  readonly asked?: readonly [string, string] | null;
  /** null when the reader may not edit. */
  readonly onInsert: ((document: RunDocument) => void) | null;
  readonly onClose: () => void;
}

/** Two fixed ends in, two cut elbows and a pipe out, or the refusal with what would make it work. */
export function CloseDialog(props: CloseDialogProps) {
  return (
    <Dialog open={props.open} onClose={props.onClose} title="Close between ends" wide>
      <ClosingView {...props} />
    </Dialog>
  );
}

function firstForm({ model, pointId }: CloseDialogProps): ClosingForm {
  const { settings } = model.document;
  const radius = settings.elbow;
  const start = pointId ? endFromPoint(model, pointId, 0) : null;
  return {
    nps: (pointId ? sizeAfter(model, pointId) : null) ?? settings.pipe.nps,
    rootGap: lengthEntryText(settings.allowances.rootGapMm, settings.units),
    end0: { ...EMPTY_END, radius, ...(start ?? {}) },
    end1: { ...EMPTY_END, radius },
  };
}

function ClosingView(props: CloseDialogProps) {
  const { model, takeOuts } = props;
  const { units } = model.document.settings;
  const [form, setForm] = useState<ClosingForm>(() => firstForm(props));
  const surveyed = useSurveyedEnds(props.lineId ?? null);
  const [taken, setTaken] = useState(false);
  const asked = !taken && surveyed.length > 0 ? (props.asked?.map((choice) => endFromSurvey(surveyed, choice, units)) ?? null) : null;
  if (asked) {
    setTaken(true);
    setForm((now) => ({ ...now, end0: { ...now.end0, ...asked[0] }, end1: { ...now.end1, ...asked[1] } }));
  }
  const settled = useDeferredValue(form);
  const read = useMemo(() => readClosingForm(settled, units, takeOuts), [settled, units, takeOuts]);
  const answer = useMemo(() => (read.ok ? closeBetween(read.input) : null), [read]);
  const [stamp] = useState(props.stamp);
  const plan = useMemo(() => (read.ok && answer?.ok ? planInsert(settled, answer, read.input, model, stamp) : null), [read, answer, settled, model, stamp]);
  const [trim, setTrim] = useState<{ readonly of: unknown; readonly taken: FitTrim | null }>({ of: null, taken: null });
  const fieldFit = trim.of === answer ? trim.taken : null;
  const inserted = plan?.ok && answer?.ok && fieldFit ? withFieldFit(plan.document, model.document, answer, fieldFit) : plan?.ok ? plan.document : null;
  const messages = read.ok ? {} : read.messages;
  const setEnd = (name: "end0" | "end1") => (end: EndForm) =>
    setForm((now) => ({ ...now, [name]: end, nps: sizeTaken(model, now[name], end) ?? now.nps }));
  return (
    <>
      <p className="mb-4 text-soft">Two fixed pipe ends, one elbow cut at each, one straight pipe between. With these radii there is at most one such closing. Every other sensible way stands below it.</p>
      <div className="grid gap-6 lg:grid-cols-2">
        <EndFields title="End 0" name="end0" side={0} end={form.end0} form={form} messages={messages} onChange={setEnd("end0")} surveyed={surveyed} {...props} />
        <EndFields title="End 1" name="end1" side={1} end={form.end1} form={form} messages={messages} onChange={setEnd("end1")} surveyed={surveyed} {...props} />
      </div>
      <div className="mt-4 grid grid-cols-2 gap-4 sm:grid-cols-4">
        <Select label="Size" options={NPS_OPTIONS} value={form.nps} onChange={(event) => setForm((now) => ({ ...now, nps: event.target.value as Nps }))} />
        <TextField label="Root gap" figure value={form.rootGap} error={messages.rootGap} onChange={(event) => setForm((now) => ({ ...now, rootGap: event.target.value }))} />
      </div>
      <section aria-label="Answer" aria-live="polite" className="mt-6 border-t border-ink pt-4">
        {answer === null || !read.ok ? <p className="text-soft">The answer stands here once both ends are complete.</p> : <ClosingAnswer form={settled} input={read.input} answer={answer} model={model} takeOuts={takeOuts} />}
        {read.ok && answer?.ok ? <FitPanel key={units} input={read.input} answer={answer} surveyedIds={[settled.end0.surveyed?.endId ?? null, settled.end1.surveyed?.endId ?? null]} lineId={props.lineId ?? null} nps={settled.nps} settings={model.document.settings} taken={fieldFit?.jointId ?? null} onTake={props.onInsert && plan?.ok ? (taken) => setTrim({ of: answer, taken }) : undefined} /> : null}
      </section>
      {props.onInsert ? (
        <>
          {plan ? <p className="mt-4 text-sm text-soft">{plan.ok ? plan.words : plan.message}{fieldFit ? ` Field-fit weld at ${fieldFit.joint}: leave ${trimWords(fieldFit.trimMm, units)} on.` : ""}</p> : null}
          <DialogActions>
            <Button tone="primary" disabled={!inserted} onClick={() => inserted && props.onInsert?.(inserted)}>
              Insert into the run
            </Button>
          </DialogActions>
        </>
      ) : (
        <Notice className="mt-4">Your role reads lines; a detailer inserts.</Notice>
      )}
      {read.ok ? <ClosingWays form={settled} input={read.input} model={model} takeOuts={takeOuts} stamp={stamp} onInsert={props.onInsert} /> : null}
    </>
  );
}

/** Size that comes with a row just taken; null when the end was typed in. */
function sizeTaken(model: Model, before: EndForm, end: EndForm): Nps | null {
  return end.pointId !== "" && end.pointId !== before.pointId ? sizeAfter(model, end.pointId) : null;
}

interface EndFieldsProps extends CloseDialogProps {
  readonly title: string;
  readonly name: string;
  readonly side: 0 | 1;
  readonly end: EndForm;
  readonly form: ClosingForm;
  readonly messages: FieldMessages;
  readonly onChange: (end: EndForm) => void;
  readonly surveyed: readonly SurveyedEndResult[];
}

function EndFields({ title, name, side, end, form, messages, onChange, model, takeOuts, surveyed }: EndFieldsProps) {
  const { units } = model.document.settings;
  const rows = useMemo(() => [...rowOptions(model), ...surveyedOptions(surveyed)], [model, surveyed]);
  // A number typed over a surveyed one was not measured there.
  const set = (field: keyof EndForm) => (event: ChangeEvent<HTMLInputElement | HTMLSelectElement>) => onChange({ ...end, [field]: event.target.value, ...(["e", "n", "u", "direction"].includes(field) ? { surveyed: undefined } : {}) });
  const takeRow = (event: ChangeEvent<HTMLSelectElement>): void => {
    const choice = event.target.value;
    const measured = endFromSurvey(surveyed, choice, units);
    if (measured) return onChange({ ...end, ...measured });
    const taken = choice === "" ? null : endFromPoint(model, choice, side);
    onChange(taken ? { ...end, ...taken, surveyed: undefined } : { ...end, pointId: "", surveyed: undefined });
  };
  const text = (field: keyof EndForm, label: string, hint?: string, placeholder?: string) => (
    <TextField label={label} hint={hint} figure placeholder={placeholder} value={String(end[field] ?? "")} onChange={set(field)} error={messages[`${name}.${field}`]} />
  );
  return (
    <fieldset className="min-w-0">
      <legend className="mb-2 font-bold">{title}</legend>
      <div className="space-y-3">
        <Select label="Taken from" options={rows} value={takenFrom(end)} onChange={takeRow} />
        <div className="grid grid-cols-3 gap-2">
          {text("e", "E", undefined, "0")}
          {text("n", "N", undefined, "0")}
          {text("u", "U", undefined, "0")}
        </div>
        <div className="grid grid-cols-2 items-end gap-2">
          {text("direction", "Points", "out of the end, to the gap", "E, UN, 045/30")}
          {text("straight", "Straight", "pipe before the elbow", "none")}
        </div>
        <div className="grid grid-cols-2 items-end gap-2">
          <Select
            label="Elbow radius"
            value={end.radius}
            onChange={set("radius")}
            error={messages[`${name}.radius`]}
            options={[
              { value: "LR", label: `LR, ${radiusHint("LR", form.nps, units, takeOuts)}` },
              { value: "SR", label: `SR, ${radiusHint("SR", form.nps, units, takeOuts)}` },
              { value: "own", label: "own radius" },
            ]}
          />
          {end.radius === "own" ? text("ownRadius", "Own radius") : null}
        </div>
      </div>
    </fieldset>
  );
}

function rowOptions(model: Model): readonly { readonly value: string; readonly label: string }[] {
  const { document } = model;
  const rows = model.nodes.map((node) => {
    const place = pointPlace(document, node.pointId);
    const point = document.runs.find((run) => run.id === place?.runId)?.points[place?.row ?? 0];
    const branch = node.runId === document.runs[0]?.id ? "" : "branch, ";
    return { value: node.pointId, label: `${branch}row ${node.index + 1}${point && point.item.kind !== "none" ? `, ${itemEcho(point.item)}` : ""}` };
  });
  return [{ value: "", label: "typed here" }, ...rows];
}
