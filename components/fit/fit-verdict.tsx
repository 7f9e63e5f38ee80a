/** The verdict: one line, then the chance as a number, as a word and as a bar that reads in black and white. */
import { chanceNumber, type FitResult } from "@/iso";
import { Notice } from "@/components/ui/notice";
import { likelihood } from "./fit-words";

export function FitVerdict({ result, target }: { readonly result: FitResult; readonly target: number }) {
  const { probability } = result;
  if (probability === null) return <Notice tone="caution">{result.sentence}</Notice>;
  return (
    <div>
      <p className="text-lg font-medium">{result.sentence}</p>
      <div className="mt-3 flex items-end gap-4">
        <p className="shrink-0">
          <span className="figure text-3xl font-bold">{chanceNumber(probability)}</span> <span className="text-soft">in 100</span>
          <span className="block font-medium">{likelihood(probability)}</span>
        </p>
        <ChanceBar probability={probability} target={target} />
      </div>
      {result.advice ? <p className="mt-3">{result.advice}</p> : null}
    </div>
  );
}

const SCALE = [0, 25, 50, 75, 100];

/** A rule from 0 to 100, filled to the chance, with a stroke across it where the chance is wanted. */
function ChanceBar({ probability, target }: { readonly probability: number; readonly target: number }) {
  const wanted = 100 * target;
  return (
    <div className="w-full min-w-0 max-w-xl">
      <svg role="img" aria-label={`${chanceNumber(probability)} in 100; ${Math.round(wanted)} wanted`} viewBox="0 0 100 10" preserveAspectRatio="none" className="block h-8 w-full overflow-visible">
        <rect x="0" y="2" width="100" height="6" fill="var(--color-sheet)" stroke="var(--color-ink)" vectorEffect="non-scaling-stroke" />
        <rect x="0" y="2" width={100 * probability} height="6" fill="var(--color-ink)" />
        <path d={`M${wanted} 0v10`} stroke="var(--color-sheet)" strokeWidth="7" vectorEffect="non-scaling-stroke" />
        <path d={`M${wanted} 0v10`} stroke="var(--color-dye)" strokeWidth="3" vectorEffect="non-scaling-stroke" />
      </svg>
      <p aria-hidden className="figure flex justify-between text-xs text-soft">
        {SCALE.map((tick) => (
          <span key={tick}>{tick}</span>
        ))}
      </p>
    </div>
  );
}
