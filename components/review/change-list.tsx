import { EmptyState } from "@/components/ui/empty-state";
import { Table, type Column } from "@/components/ui/table";
import type { Change } from "@/lib/rules/api-types";

const KINDS: Readonly<Record<Change["kind"], string>> = {
  added: "+ Added",
  removed: "- Removed",
  changed: "Changed",
};

const COLUMNS: readonly Column<Change>[] = [
  {
    key: "kind",
    head: "Change",
    cell: (change) => <span className="font-medium whitespace-nowrap">{KINDS[change.kind]}</span>,
  },
  {
    key: "text",
    head: "What",
    cell: (change) => (
      <span>
        {change.mark ? <strong className="figure mr-2">{change.mark}</strong> : null}
        {change.text}
      </span>
    ),
  },
  {
    key: "values",
    head: "Before, after",
    cell: (change) =>
      change.before === null && change.after === null ? null : (
        <span className="figure text-sm">
          {change.before === null ? null : <del className="block text-soft">{change.before}</del>}
          {change.after === null ? null : <ins className="block no-underline">{change.after}</ins>}
        </span>
      ),
  },
];

/** The differences to the revision in force, in words. */
export function ChangeList({
  changes,
  first,
}: {
  readonly changes: readonly Change[];
  readonly first: boolean;
}) {
  if (first) return <p className="text-soft">There is none before it, so everything on the sheet is new.</p>;
  if (changes.length === 0)
    return <EmptyState title="No difference in content">Only the words of the revision changed.</EmptyState>;
  const rows = changes.map((change, n) => ({ ...change, n }));
  return (
    <Table
      caption="What changed"
      columns={COLUMNS}
      rows={rows}
      rowKey={(change) => `${(change as Change & { n: number }).n}`}
    />
  );
}
