import type { ReactNode } from "react";

/** Nothing here yet: says so, says what to do next, and offers it. */
export function EmptyState({
  title,
  children,
  action,
}: {
  readonly title: string;
  readonly children?: ReactNode;
  readonly action?: ReactNode;
}) {
  return (
    <div className="border border-dashed border-rule px-5 py-8 text-center">
      <p className="text-lg font-bold">{title}</p>
      {children ? <div className="mx-auto mt-1 max-w-prose text-soft">{children}</div> : null}
      {action ? <div className="mt-4 flex flex-wrap justify-center gap-3">{action}</div> : null}
    </div>
  );
}
