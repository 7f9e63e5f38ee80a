"use client";
import { Button } from "@/components/ui/button";
import { dayText } from "@/components/ui/format";
import type { Role, WorkEntry, WorkKind } from "@/lib/rules/api-types";
import { canRecord } from "@/lib/rules/permissions";
import { FIELD_WORDS, WORK_WORDS } from "./work-words";

export interface LogCellProps {
  readonly entries: readonly WorkEntry[];
  readonly kinds: readonly WorkKind[];
  readonly role: Role;
  /** False when there is no live sheet to work from, it is on hold, or closed as-built. */
  readonly open: boolean;
  readonly markName: string;
  readonly onRecord: (kind: WorkKind) => void;
}

/** What was recorded on one piece or weld, and the buttons to record more. */
export function LogCell({ entries, kinds, role, open, markName, onRecord }: LogCellProps) {
  const mine = open ? kinds.filter((kind) => canRecord(role, kind)) : [];
  return (
    <div className="space-y-2">
      {entries.length > 0 ? (
        <ul className="space-y-1 text-sm">
          {entries.map((entry) => (
            <li key={entry.id}>
              <strong>{WORK_WORDS[entry.kind]}</strong> {entryText(entry)}
              <span className="block text-soft">
                {entry.by}, {dayText(entry.at)}, rev {entry.revisionCode}
              </span>
            </li>
          ))}
        </ul>
      ) : (
        <span className="text-soft">Nothing recorded</span>
      )}
      {mine.length > 0 ? (
        <div className="flex flex-wrap gap-2" data-screen-only>
          {mine.map((kind) => (
            <Button
              key={kind}
              className="min-h-12 min-w-20"
              onClick={() => onRecord(kind)}
              aria-label={`Record ${WORK_WORDS[kind].toLowerCase()} of ${markName}`}
            >
              {WORK_WORDS[kind]}
            </Button>
          ))}
        </div>
      ) : null}
    </div>
  );
}

/** "heat no. A123, length 28 1/4": the filled fields of an entry. */
export function entryText(entry: WorkEntry): string {
  return Object.entries(entry.values)
    .filter(([, value]) => value !== "")
    .map(([name, value]) => `${(FIELD_WORDS[name]?.label ?? name).toLowerCase()} ${value}`)
    .join(", ");
}
