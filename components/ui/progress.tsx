import clsx from "clsx";

/** Work of unknown length, named in words. */
export function Spinner({ label }: { readonly label: string }) {
  return (
    <p role="status" className="inline-flex items-center gap-3 text-soft">
      <svg
        aria-hidden
        viewBox="0 0 24 24"
        className="size-5 animate-spin"
        fill="none"
        stroke="currentColor"
        strokeWidth="2"
      >
        <circle cx="12" cy="12" r="8" strokeOpacity="0.3" />
        <path d="M12 1v6" strokeWidth="3" />
      </svg>
      {label}
    </p>
  );
}

/** How much of a countable job is done, as a bar and in figures ("3 of 8 cut"). */
export function Progress({
  done,
  of,
  word,
  className,
}: {
  readonly done: number;
  readonly of: number;
  readonly word: string;
  readonly className?: string;
}) {
  const share = of > 0 ? Math.min(1, done / of) : 0;
  return (
    <span className={clsx("block", className)}>
      <span className="figure text-sm">
        {done} of {of} {word}
      </span>
      <svg aria-hidden viewBox="0 0 100 6" preserveAspectRatio="none" className="mt-0.5 block h-1.5 w-full">
        <rect
          x="0"
          y="0"
          width="100"
          height="6"
          fill="none"
          stroke="var(--color-rule)"
          strokeWidth="1"
          vectorEffect="non-scaling-stroke"
        />
        <rect x="0" y="0" width={share * 100} height="6" fill="var(--color-dye)" />
      </svg>
    </span>
  );
}

/** Grey lines where rows are still coming. */
export function Skeleton({
  lines = 4,
  label = "Loading",
}: {
  readonly lines?: number;
  readonly label?: string;
}) {
  return (
    <div role="status" className="space-y-3 py-2">
      <span className="sr-only">{label}</span>
      {Array.from({ length: lines }, (_, n) => (
        <div key={n} className={clsx("skeleton h-6", n % 3 === 2 ? "w-2/3" : "w-full")} />
      ))}
    </div>
  );
}
