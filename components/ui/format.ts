/** How times and counts are written for a reader; the reader's own time zone, American order. */

const DAY = new Intl.DateTimeFormat("en-US", { month: "short", day: "numeric", year: "numeric" });
const MINUTE = new Intl.DateTimeFormat("en-US", {
  month: "short",
  day: "numeric",
  year: "numeric",
  hour: "numeric",
  minute: "2-digit",
});

/** "Dec 1, 2025", or "" for an empty or unreadable time. */
export function dayText(iso: string | null): string {
  return textOf(DAY, iso);
}

/** "Dec 1, 2025, 9:15 AM", or "" for an empty or unreadable time. */
export function timeText(iso: string | null): string {
  return textOf(MINUTE, iso);
}

function textOf(format: Intl.DateTimeFormat, iso: string | null): string {
  if (!iso) return "";
  const date = new Date(iso);
  return Number.isNaN(date.getTime()) ? "" : format.format(date);
}

/** "1 spool", "3 spools". */
export function countText(count: number, one: string, many = `${one}s`): string {
  return `${count.toLocaleString("en-US")} ${count === 1 ? one : many}`;
}

/** "24 KB": sizes for people, not for machines. */
export function bytesText(bytes: number): string {
  if (bytes < 1024) return `${bytes} bytes`;
  return bytes < 1024 * 1024 ? `${Math.round(bytes / 1024)} KB` : `${(bytes / (1024 * 1024)).toFixed(1)} MB`;
}

/** First and last digits of a hash, for the eye; the whole one goes beside it for the machine. */
export function hashText(sha256: string): string {
  return sha256.length > 20 ? `${sha256.slice(0, 8)}...${sha256.slice(-8)}` : sha256;
}
