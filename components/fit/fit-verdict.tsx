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

/** A rule from 0 to 100, filled to the chance, with a mark where it is wanted. */
function ChanceBar({ probability, target }: { readonly probability: number; readonly target: number }) {
  const chance = 100 * probability;
  return (
    <svg role="img" aria-label={`${chanceNumber(probability)} in 100; ${Math.round(100 * target)} wanted`} viewBox="-2 0 104 18" className="block h-auto w-full min-w-0 max-w-xl">
      <rect x="0" y="4" width="100" height="6" fill="var(--color-sheet)" stroke="var(--color-ink)" strokeWidth="0.4" />
      <rect x="0" y="4" width={chance} height="6" fill="var(--color-ink)" />
      <path d={`M${100 * target} 2.5v9`} stroke="var(--color-dye)" strokeWidth="0.9" />
      <path d={`M${100 * target} 4.2l-1.6 -2.8h3.2z`} fill="var(--color-dye)" />
      {SCALE.map((tick) => (
        <g key={tick}>
          <path d={`M${tick} 10v1.6`} stroke="var(--color-ink)" strokeWidth="0.4" />
          <text x={tick} y="16.2" fontSize="4" textAnchor="middle" fill="var(--color-soft)">{tick}</text>
        </g>
      ))}
    </svg>
  );
}
