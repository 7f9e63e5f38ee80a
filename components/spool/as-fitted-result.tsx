"use client";
import { useMemo, useState } from "react";
import { asFittedMended, FITTED_VIEWS, FITTED_WORDS, fittedPicture, fittedWayWords, formatAngleDeg, formatFraction, formatTapeLength, type AsFittedDocument, type AsFittedResult, type FaceResult, type FittedVerdict, type FittedView, type UnitSystem, type View, type Wanted } from "@/iso";
import { measureText } from "@/fonts/widths";
import { DisplaySvg } from "@/components/sheet/display-svg";
import { Button } from "@/components/ui/button";
import { ChoiceRow } from "@/components/ui/choice-row";
import { Notice } from "@/components/ui/notice";

const TONES: Readonly<Record<FittedVerdict, string>> = {
  go: "border-ink", near: "border-caution text-caution", trim: "border-caution text-caution", stop: "border-alert text-alert", none: "border-rule text-soft",
};

/** A rule at the left in the verdict's tone; the words beside it say the verdict. */
export const verdictClass = (verdict: FittedVerdict): string => `block border-l-4 pl-2 ${TONES[verdict]}`;

function VerdictWord({ verdict }: { readonly verdict: FittedVerdict }) {
  return <strong className={`whitespace-nowrap border-l-4 pl-2 ${TONES[verdict]}`}>{FITTED_WORDS[verdict]}</strong>;
}

export interface ResultProps {
  readonly result: AsFittedResult;
  readonly document: AsFittedDocument;
  readonly wanted: Wanted;
  readonly view: View;
  readonly units: UnitSystem;
  readonly onChange: (document: AsFittedDocument) => void;
}

/** What came of it: one line first, then doubts with what mends them, the picture, and every number. */
export function AsFittedResultView({ result, document, wanted, view, units, onChange }: ResultProps) {
  return (
    <div aria-live="polite">
      <p className={`mb-3 border-l-4 px-4 py-3 text-lg font-medium ${TONES[result.verdict]}`}>{result.headline}</p>
      {result.findings.map((finding) => (
        <Notice key={finding.code + finding.sentence} tone={finding.tone === "wrong" ? "trouble" : finding.tone === "warn" ? "caution" : "note"} word={finding.tone === "wrong" ? "Check" : undefined} className="mb-2">
          {finding.sentence}
          {finding.mend ? <Button className="ml-3" onClick={() => onChange(asFittedMended(document, finding.mend!))}>{finding.mendWords}</Button> : null}
        </Notice>
      ))}
      {result.changes.length > 0 ? (
        <div className="mb-3">
          <h3>{result.changes.length === 1 ? "One change would mend it" : "Any one of these would mend it"}</h3>
          <ul className="list-disc pl-6">{result.changes.map((change) => <li key={change.words}>{change.words}</li>)}</ul>
          <p className="text-sm text-soft">Cutting out and welding again needs the inspector&apos;s word. Do not pull, jack or heat to fit.</p>
        </div>
      ) : null}
      {result.motion ? <Picture result={result} wanted={wanted} view={view} /> : null}
      <FaceTable result={result} units={units} />
      <PairTable result={result} units={units} />
    </div>
  );
}

/** Small enough that its letters can be read on a phone, mm. */
const SIZE = { widthMm: 105, heightMm: 84 };
const VIEW_LABELS: Readonly<Record<FittedView, string>> = { isometric: "Isometric", plan: "Plan", elevation: "Elevation" };

function Picture({ result, wanted, view }: { readonly result: AsFittedResult; readonly wanted: Wanted; readonly view: View }) {
  const [shown, setShown] = useState<FittedView>("isometric");
  const items = useMemo(() => fittedPicture(wanted, result, shown, view, { minX: 0, minY: 0, maxX: SIZE.widthMm, maxY: SIZE.heightMm }, measureText), [wanted, result, shown, view]);
  return (
    <div className="mb-4">
      <ChoiceRow label="View" value={shown} onChange={setShown} choices={FITTED_VIEWS.map((value) => ({ value, label: VIEW_LABELS[value] }))} />
      <svg viewBox={`0 0 ${SIZE.widthMm} ${SIZE.heightMm}`} role="img" aria-label={`Measured against drawn, ${VIEW_LABELS[shown].toLowerCase()}`} className="drawn block h-auto w-full max-w-2xl border border-hair bg-white">
        <DisplaySvg items={items} />
      </svg>
    </div>
  );
}

function signed(mm: number | null, units: UnitSystem): string {
  if (mm === null) return "";
  const size = formatFraction(Math.abs(mm), units);
  return /^0 /.test(size) ? size : `${mm > 0 ? "+" : "-"}${size}`;
}

function FaceTable({ result, units }: { readonly result: AsFittedResult; readonly units: UnitSystem }) {
  const rows = [...result.faces, ...result.corners.filter((corner) => corner.at)];
  return (
    <table role="table" data-stack className="ruled mb-4">
      <caption className="sr-only">Faces and corners, measured less wanted</caption>
      <thead role="rowgroup">
        <tr role="row">{["At", "Along", "Across", "Lean", "Bolt holes", "Verdict"].map((head) => <th key={head} role="columnheader" scope="col">{head}</th>)}</tr>
      </thead>
      <tbody role="rowgroup">{rows.map((row) => <FaceRow key={row.mark} row={row} units={units} />)}</tbody>
    </table>
  );
}

function FaceRow({ row, units }: { readonly row: FaceResult; readonly units: UnitSystem }) {
  const isCorner = row.mark.startsWith("W");
  const cells = [
    ["Along", signed(row.alongMm, units)],
    ["Across", row.acrossMm === null ? "" : isCorner && row.off ? fittedWayWords(row.off, units) : formatFraction(row.acrossMm, units)],
    ["Lean", row.leanRad === null ? (isCorner || !row.at ? "" : "not measured") : `${formatFraction(row.gapMm!, units)}, ${formatAngleDeg(row.leanRad)}`],
    ["Bolt holes", row.holesRad === null ? "" : `${formatAngleDeg(Math.abs(row.holesRad))} ${row.holesRad > 0 ? "clockwise" : "counter-clockwise"}`],
  ] as const;
  return (
    <tr role="row">
      <td role="cell" data-label="At">
        <span><strong>{isCorner ? row.mark : `End ${row.mark}`}</strong><span className="block text-sm text-soft">{isCorner ? row.name.toLowerCase() : row.name}</span></span>
      </td>
      {cells.map(([label, text]) => <td key={label} role="cell" data-label={label} className="figure">{text || "-"}</td>)}
      <td role="cell" data-label="Verdict"><span><VerdictWord verdict={row.verdict} />{row.words.length > 0 ? <span className="block text-sm">{row.words.join("; ")}</span> : null}</span></td>
    </tr>
  );
}

function PairTable({ result, units }: { readonly result: AsFittedResult; readonly units: UnitSystem }) {
  if (result.pairs.length === 0) return null;
  return (
    <table role="table" data-stack className="ruled mb-4">
      <caption className="sr-only">Face to face</caption>
      <thead role="rowgroup">
        <tr role="row">{["Ends", "Wanted", "Actual", "Off", "East, north, up, off", "Verdict"].map((head) => <th key={head} role="columnheader" scope="col">{head}</th>)}</tr>
      </thead>
      <tbody role="rowgroup">
        {result.pairs.map((pair) => (
          <tr key={`${pair.a}-${pair.b}`} role="row">
            <td role="cell" data-label="Ends"><strong>{pair.a} to {pair.b}</strong></td>
            <td role="cell" data-label="Wanted" className="figure">{formatTapeLength(pair.wantedMm, units)}</td>
            <td role="cell" data-label="Actual" className="figure">{formatTapeLength(pair.actualMm, units)}</td>
            <td role="cell" data-label="Off" className="figure">{signed(pair.actualMm - pair.wantedMm, units)}</td>
            <td role="cell" data-label="East, north, up, off" className="figure">{pair.off ? pair.off.map((mm) => signed(mm, units)).join(", ") : "-"}</td>
            <td role="cell" data-label="Verdict"><VerdictWord verdict={pair.verdict} /></td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
