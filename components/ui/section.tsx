import clsx from "clsx";
import { useId, type ReactNode } from "react";

/** A part of a page under a ruled heading. */
export function Section({
  title,
  aside,
  children,
  className,
  id,
}: {
  readonly title: string;
  readonly aside?: ReactNode;
  readonly children: ReactNode;
  readonly className?: string;
  readonly id?: string;
}) {
  const headingId = useId();
  return (
    <section id={id} aria-labelledby={headingId} className={clsx("mb-8", className)}>
      <div className="mb-3 flex flex-wrap items-end justify-between gap-3 border-b border-hair pb-2">
        <h2 id={headingId}>{title}</h2>
        {aside}
      </div>
      {children}
    </section>
  );
}
