import Link from "next/link";
import type { ReactNode } from "react";

export interface StripCell {
  readonly label: string;
  readonly value: ReactNode;
  readonly figure?: boolean;
}

export interface TitleStripProps {
  readonly title: ReactNode;
  /** What kind of thing it is, above the title ("Job", "Spool"). */
  readonly kind?: string;
  /** Where one came from, outermost first. */
  readonly trail?: readonly { readonly href: string; readonly label: string }[];
  readonly cells?: readonly StripCell[];
  readonly actions?: ReactNode;
}

/** The head of a page, ruled like the title block of a drawing: what it is, its facts in cells, what can be done. */
export function TitleStrip({ title, kind, trail, cells, actions }: TitleStripProps) {
  return (
    <header className="mb-6">
      {trail && trail.length > 0 ? (
        <nav
          aria-label="Where you are"
          className="mb-1 flex flex-wrap items-center gap-x-2 text-sm"
          data-screen-only
        >
          {trail.map((step, at) => (
            <span key={step.href} className="inline-flex items-center gap-2">
              {at > 0 ? <span aria-hidden>/</span> : null}
              <Link href={step.href} className="inked inline-flex min-h-8 items-center">
                {step.label}
              </Link>
            </span>
          ))}
        </nav>
      ) : null}
      <div className="border-y border-ink">
        <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3 py-3">
          <div className="min-w-0">
            {kind ? <p className="cell-label">{kind}</p> : null}
            <h1 className="break-words">{title}</h1>
          </div>
          {actions ? (
            <div className="flex flex-wrap gap-3" data-screen-only>
              {actions}
            </div>
          ) : null}
        </div>
        {cells && cells.length > 0 ? <Cells cells={cells} /> : null}
      </div>
    </header>
  );
}

function Cells({ cells }: { readonly cells: readonly StripCell[] }) {
  return (
    <dl className="grid grid-cols-2 gap-x-4 border-t border-hair sm:flex sm:flex-wrap sm:gap-x-0">
      {cells.map((cell) => (
        <div
          key={cell.label}
          className="min-w-0 py-2 sm:min-w-32 sm:grow sm:border-r sm:border-hair sm:pr-3 sm:pl-3 sm:first:pl-0 sm:last:border-r-0"
        >
          <dt className="cell-label">{cell.label}</dt>
          <dd className={cell.figure ? "figure" : undefined}>{cell.value}</dd>
        </div>
      ))}
    </dl>
  );
}
