import { Progress } from "@/components/ui/progress";
import type { PackageRow } from "@/lib/rules/packages";

/** How far a package is: sheets prepared, then the putting together, which has no count. */
export function PackageProgress({ one }: { readonly one: Pick<PackageRow, "prepared" | "sheets"> }) {
  return (
    <>
      <Progress done={one.prepared} of={one.sheets} word="sheets prepared" className="max-w-sm" />
      {one.prepared >= one.sheets ? <span className="text-sm text-soft">Putting them together</span> : null}
    </>
  );
}
