"use client";
import { useMemo } from "react";
import { buildModel, emptyMarks, formatDecimal, INCH_MM, type CloseBetweenInput, type ClosingFound, type ClosingRefused, type Model, type TakeOutWord } from "@/iso";
import { Notice } from "@/components/ui/notice";
import type { ClosingForm } from "./closing-form";
import { closingPicture } from "./closing-picture";
import { DrawingItems } from "./drawing-items";
import { ClosingSnap } from "./closing-snap";
import { drawLine } from "./draw-line";
import { fitViewport } from "./viewport";

export interface ClosingAnswerProps {
  readonly form: ClosingForm;
  readonly input: CloseBetweenInput;
  readonly answer: ClosingFound | ClosingRefused;
  readonly model: Model;
  readonly takeOuts: readonly TakeOutWord[];
}

/** The closing as a bench needs it, or the refusal and the nearest change that would work. */
export function ClosingAnswer(props: ClosingAnswerProps) {
  const { answer } = props;
  if (!answer.ok) {
    return (
      <Notice tone="trouble" word="Does not close">
        {answer.sentence}
        {answer.whatWouldWork ? <p className="mt-1 font-medium">{answer.whatWouldWork}</p> : null}
      </Notice>
    );
  }
  return (
    <div className="grid gap-5 lg:grid-cols-[minmax(0,1fr)_minmax(0,20rem)]">
      <div className="min-w-0">
        <Facts {...props} answer={answer} />
        <Marks answer={answer} />
        <ClosingSnap key={props.input.units} input={props.input} />
        <Cautions answer={answer} />
      </div>
      <Picture {...props} answer={answer} />
    </div>
  );
}

interface Found extends ClosingAnswerProps {
  readonly answer: ClosingFound;
}

function exactText(mm: number, units: CloseBetweenInput["units"]): string {
  return units === "metric" ? `${formatDecimal(mm, 2)} mm` : `${formatDecimal(mm / INCH_MM, 4)} in`;
}

function Facts({ answer, input }: Found) {
  const { units } = input;
  return (
    <dl className="grid grid-cols-2 gap-x-6 gap-y-2 sm:grid-cols-3">
      <Fact label="Pipe, on a tape" value={answer.pipeText} large />
      <Fact label="Pipe, exact" value={exactText(answer.pipeLengthMm, units)} />
      {answer.rollText ? <Fact label="Roll, looking along the pipe" value={answer.rollText} more={answer.rollArcText ? `arc ${answer.rollArcText}` : undefined} /> : <Fact label="Roll" value="one elbow, none" />}
      {answer.bends.map((bend) => (
        <Fact key={bend.end} label={`Elbow at end ${bend.end}`} value={`${bend.angleText}${bend.elbow === "90" ? ", whole 90" : ""}`} large />
      ))}
      {answer.bends.map((bend) => (
        <Fact key={`t${bend.end}`} label={`Take-out at end ${bend.end}`} value={bend.takeOutText} />
      ))}
    </dl>
  );
}

function Fact({ label, value, more, large }: { readonly label: string; readonly value: string; readonly more?: string | undefined; readonly large?: boolean }) {
  return (
    <div>
      <dt className="cell-label">{label}</dt>
      <dd className={large ? "figure text-lg font-medium" : "figure"}>
        {value}
        {more ? <span className="block">{more}</span> : null}
      </dd>
    </div>
  );
}

function Marks({ answer }: { readonly answer: ClosingFound }) {
  const trimmed = answer.bends.filter((bend) => bend.elbow === "trimmed");
  if (trimmed.length === 0) return null;
  return (
    <table className="ruled mt-4 text-sm">
      <caption className="pb-1 text-left font-medium">Marks on the elbow, along its surface from the uncut end</caption>
      <thead>
        <tr>
          <th scope="col">Elbow</th>
          <th scope="col" data-figure>Throat</th>
          <th scope="col" data-figure>Both sides</th>
          <th scope="col" data-figure>Back</th>
        </tr>
      </thead>
      <tbody>
        {trimmed.map((bend) => (
          <tr key={bend.end}>
            <td>End {bend.end}</td>
            <td data-figure className="figure">{bend.marksText.throat}</td>
            <td data-figure className="figure">{bend.marksText.sides}</td>
            <td data-figure className="figure">{bend.marksText.back}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Cautions({ answer }: { readonly answer: ClosingFound }) {
  return (
    <ul className="mt-4 list-disc space-y-1 pl-5 text-sm text-caution">
      {answer.warnings.map((warning) => (
        <li key={warning.code}>{warning.sentence}</li>
      ))}
      <li>Do not pull, jack or heat to fit.</li>
      <li>Verify by tape, two readings, before cutting. Take-outs are nominal: measure the fitting in hand.</li>
    </ul>
  );
}

const ROOM = { widthMm: 150, heightMm: 120 };

function Picture({ form, answer, input, model, takeOuts }: Found) {
  const picture = useMemo(() => {
    const document = closingPicture(form, answer, input, model.document);
    return drawLine(buildModel(document, emptyMarks(), takeOuts), ROOM, null);
  }, [form, answer, input, model.document, takeOuts]);
  if (!picture) return null;
  const view = fitViewport(picture.bounds);
  return (
    <figure className="min-w-0">
      <svg role="img" aria-label="Isometric of the closing" viewBox={`${view.x} ${view.y} ${view.width} ${view.height}`} className="frame block h-auto max-h-80 w-full">
        <DrawingItems items={picture.items} />
      </svg>
      <figcaption className="mt-1 text-xs text-soft">Not to scale.</figcaption>
    </figure>
  );
}
