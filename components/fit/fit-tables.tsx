/** What is off where: the mismatches with their ±, what each reading and tolerance adds, and where to trim. */
import { chanceNumber, trimWords, type FitContribution, type FitJudged, type FitMismatch, type FitResult, type FitTrim, type FitUp, type UnitSystem, type Vec3 } from "@/iso";
import { Check } from "@/components/ui/field";
import { Table } from "@/components/ui/table";
import { CONDITION_WORDS, mismatchWords } from "./fit-words";
import { limitText, withinText } from "./length-text";
import { canTake } from "./take-trim";

interface MismatchProps {
  readonly result: FitResult;
  readonly fitUp: FitUp;
  readonly units: UnitSystem;
  readonly axis: Vec3;
  readonly flanged: boolean;
}

export function FitMismatches({ result, fitUp, units, axis, flanged }: MismatchProps) {
  const within = (mm: number) => `± ${withinText(mm, units)}`;
  const shared = fitUp === "shared";
  const texts = ({ limitMm }: FitMismatch) => [limitMm.end0, limitMm.end1].map((mm) => (mm === null ? "free" : limitText(mm, units))) as [string, string];
  const alike = !shared || result.mismatches.every((row) => texts(row)[0] === texts(row)[1]);
  const limit = (row: FitMismatch) => (alike ? texts(row)[1] : texts(row).join("; "));
  return (
    <>
      <Table
        caption="How far the piece may miss at its ends"
        rows={result.mismatches}
        rowKey={({ what }) => what}
        columns={[
          { key: "what", head: "Mismatch", cell: ({ what }) => mismatchWords(what, axis, flanged) },
          { key: "before", head: shared ? "All at end 1" : "At end 1", className: "figure", cell: (row) => within(shared ? row.beforeMm : row.atEnd1Mm) },
          ...(shared
            ? [
                { key: "end0", head: "Left at end 0", className: "figure", cell: (row: FitMismatch) => within(row.atEnd0Mm) },
                { key: "end1", head: "Left at end 1", className: "figure", cell: (row: FitMismatch) => within(row.atEnd1Mm) },
              ]
            : []),
          { key: "limit", head: alike ? "Limit" : "Limit at 0; at 1", className: "figure", cell: limit },
        ]}
      />
      <p className="mt-2 text-sm text-soft">
        ± is two standard deviations: 95 of 100 lie within. {shared ? "The first column has end 0 set true; then both joints take a part of it, each by what it can stand. " : ""}
        {weakest(result)}
      </p>
    </>
  );
}

function takeCell(trim: FitTrim, taken: string | null, onTake: (trim: FitTrim | null) => void) {
  if (!canTake(trim) || trim.trimMm <= 0) return null;
  const on = taken === trim.jointId;
  return <Check label="Insert as FFW" checked={on} onChange={() => onTake(on ? null : trim)} />;
}

/** What is most likely to stop it, by itself. */
function weakest({ judged }: FitResult): string {
  const [first, second] = judged;
  if (!first || first.probability > SURE) return "No single one of these is likely to stop it.";
  const named = ({ joint, condition, probability }: FitJudged) => `${CONDITION_WORDS[condition]} at ${joint} (${chanceNumber(probability)} in 100 by itself)`;
  return `Most likely to stop it: ${named(first)}${second && second.probability < SURE ? `, then ${named(second)}` : ""}.`;
}

/** A chance from which a joint is no worry. */
const SURE = 0.995;

/** Rows shown before the rest is asked for. */
const FIRST = 6;

export function FitContributions({ contributions }: { readonly contributions: readonly FitContribution[] }) {
  const told = contributions.filter(({ share }) => share >= LEAST_SHARE);
  return (
    <>
      <ContributionList rows={told.slice(0, FIRST)} />
      {told.length > FIRST ? (
        <details className="mt-1">
          <summary className="inline-flex min-h-11 items-center text-dye underline underline-offset-4">{told.length - FIRST} more</summary>
          <ContributionList rows={told.slice(FIRST)} />
        </details>
      ) : null}
    </>
  );
}

/** A share that would be told as 0 %. */
const LEAST_SHARE = 0.005;

function ContributionList({ rows }: { readonly rows: readonly FitContribution[] }) {
  return (
    <ol className="divide-y divide-hair border-y border-hair">
      {rows.map(({ id, name, kind, share, halved, exact }) => (
        <li key={id} className="grid grid-cols-[minmax(0,1fr)_auto] gap-x-4 py-2">
          <span>
            {name} {kind === "shop" ? <span className="text-soft">(shop)</span> : null}
          </span>
          <span className="figure text-right">{Math.round(100 * share)} %</span>
          <svg aria-hidden viewBox="0 0 100 4" preserveAspectRatio="none" className="col-span-2 mt-1 block h-1.5 w-full">
            <rect width="100" height="4" fill="var(--color-shade)" />
            <rect width={100 * share} height="4" fill="var(--color-ink)" />
          </svg>
          <span className="col-span-2 mt-1 text-sm text-soft">
            Half as far off: {chanceNumber(halved)} in 100; exact: {chanceNumber(exact)}.
          </span>
        </li>
      ))}
    </ol>
  );
}

export interface FitTrimsProps {
  readonly trims: readonly FitTrim[];
  readonly target: number;
  readonly units: UnitSystem;
  /** Joint whose field-fit weld goes into the run, and how it is chosen; absent where nothing can be inserted. */
  readonly taken?: string | null | undefined;
  readonly onTake?: ((trim: FitTrim | null) => void) | undefined;
}

export function FitTrims({ trims, target, units, taken, onTake }: FitTrimsProps) {
  if (trims.length === 0) return <p>No pipe of this piece can be left long: there is no joint for a field-fit weld.</p>;
  return (
    <>
      <Table
        caption="Where a field-fit weld would go"
        rows={trims}
        rowKey={({ jointId }) => jointId}
        columns={[
          { key: "joint", head: "Field-fit weld (FFW) at", cell: ({ joint }) => joint },
          { key: "trim", head: "Leave on", className: "figure", cell: ({ trimMm }) => trimWords(trimMm, units) },
          { key: "chance", head: "Then fits", className: "figure", cell: ({ probability }) => `${chanceNumber(probability)} in 100` },
          { key: "reach", head: `For ${Math.round(100 * target)}`, cell: ({ reached, atMost }) => (reached ? "enough" : `not by trim: ${chanceNumber(atMost)} at most`) },
          ...(onTake ? [{ key: "take", head: "Into the run", cell: (trim: FitTrim) => takeCell(trim, taken ?? null, onTake) }] : []),
        ]}
      />
      <p className="mt-2 text-sm text-soft">
        The field cut is scribed to the face it meets, so it takes up gap and opening; it cannot take up high-low. Least that serves; 4 to 6 in (100 to 150 mm) is usual (common practice).
      </p>
    </>
  );
}
