"use client";
import { formatAngleDeg, formatDecimal, formatInches, formatLength, formatTerm, formatWeight, type UnitSystem, type Way } from "@/iso";
import { Button } from "@/components/ui/button";
import { WayPicture } from "./way-picture";

export interface WayCardProps {
  readonly way: Way;
  readonly units: UnitSystem;
  readonly rank: number;
  /** null when the reader may not edit. */
  readonly onInsert: (() => void) | null;
  /** Why it cannot be inserted; null when it can. */
  readonly refusal: string | null;
}

/** Kinds in the trade's words. */
const KINDS: Readonly<Record<Way["kind"], string>> = {
  straight: "pipe alone", "one-standard": "one whole elbow", "two-standard": "two whole elbows", "three-standard": "three whole elbows",
  "trimmed-pair": "trimmed elbows", "one-trimmed": "one whole, one trimmed", mitre: "mitred from pipe", "field-trim": "whole elbows, an end trimmed",
};

/** One way: its picture and what a shop weighs it by. */
export function WayCard({ way, units, rank, onInsert, refusal }: WayCardProps) {
  const exact = (mm: number) => (units === "metric" ? `${formatTerm(mm, units)} mm` : `${formatInches(mm, 64)}"`);
  const tape = (mm: number) => (units === "metric" ? `${formatLength(mm, units)} mm` : `${formatInches(mm)}"`);
  return (
    <li className="grid gap-4 border-t border-rule py-4 sm:grid-cols-[10rem_minmax(0,1fr)]">
      <WayPicture way={way} className="frame h-auto w-full max-w-64 bg-sheet" />
      <div className="min-w-0">
        <div className="flex flex-wrap items-baseline justify-between gap-x-4">
          <h4 className="font-bold">
            {rank}. {way.title}
          </h4>
          <span className="text-sm text-soft">{KINDS[way.kind]}</span>
        </div>
        <dl className="mt-2 grid grid-cols-2 gap-x-5 gap-y-1 text-sm sm:grid-cols-4">
          <Fact label="Welds" value={String(way.welds)} />
          <Fact label="Trimmed cuts" value={String(way.trimmedCuts)} />
          <Fact label="Center line" value={tape(way.lengthMm)} />
          <Fact label="Weight, empty" value={way.weightKg === null ? "not known" : formatWeight(way.weightKg, units)} />
          <Fact label="Pipe to cut" value={way.cuts.length === 0 ? "none" : way.cuts.map(exact).join(", ")} wide />
          <Fact label="Shortest pup" value={way.minimumPupMm === null ? "no pipe" : exact(way.minimumPupMm)} />
          <Fact label="Keep-out" value={way.keepOut.spareMm === null ? "none given" : way.keepOut.clear ? `clear, ${tape(way.keepOut.spareMm)} to spare` : `too near ${way.keepOut.nearest ?? ""}`} />
          {way.turns.some((turn) => turn.fitting.make === "elbow" && !turn.fitting.whole) ? (
            <Fact label="Angles" value={way.turns.map((turn) => formatAngleDeg(turn.angleRad)).join(", ")} wide />
          ) : null}
        </dl>
        <p className="mt-2 text-sm text-soft">{way.sensitivity.words}</p>
        {way.warnings.length > 0 ? (
          <ul className="mt-1 list-disc space-y-0.5 pl-5 text-sm text-caution">
            {way.warnings.map((warning) => (
              <li key={warning}>{warning}</li>
            ))}
          </ul>
        ) : null}
        <details className="mt-1 text-sm text-soft">
          <summary className="min-h-11 cursor-pointer py-2.5 sm:min-h-0 sm:py-0.5">Where the numbers are from</summary>
          <ul className="list-disc pl-5">
            {way.sources.map((source) => (
              <li key={source} className="break-words">{source}</li>
            ))}
            <li>Weight: {way.weightSource}. Closes within {formatDecimal(way.closesWithinMm, 6)} mm.</li>
          </ul>
        </details>
        {onInsert ? (
          <div className="mt-2 flex flex-wrap items-center gap-3">
            <Button disabled={refusal !== null} onClick={onInsert} aria-label={`Insert way ${rank}, ${way.title}`}>
              Insert this way
            </Button>
            {refusal !== null ? <span className="text-sm text-soft">{refusal}</span> : null}
          </div>
        ) : null}
      </div>
    </li>
  );
}

function Fact({ label, value, wide }: { readonly label: string; readonly value: string; readonly wide?: boolean }) {
  return (
    <div className={wide ? "col-span-2" : undefined}>
      <dt className="cell-label">{label}</dt>
      <dd className="figure break-words">{value}</dd>
    </div>
  );
}
