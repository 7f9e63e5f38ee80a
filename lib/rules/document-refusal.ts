/** Why a run document is refused, for a reader: which point, and what about it; never a parser's words. */
import { MAX_POINTS } from "@/iso";

const PARTS: Readonly<Record<string, string>> = {
  offset: "its offset",
  item: "what stands there",
  places: "where its welds are made",
  provenance: "where its number came from",
  trimMm: "its trim",
  note: "its note",
  id: "its id",
};

/** One sentence from one message of parseRunDocument ("path: what zod says", or a sentence already). */
export function documentSentence(message: string): string {
  const path = /^([\w.]+): /.exec(message)?.[1];
  if (path === undefined) return message;
  const point = /^runs\.(\d+)\.points\.(\d+)(?:\.(\w+))?/.exec(path);
  if (point !== null) {
    const run = point[1] === "0" ? "the main run" : `branch ${point[1]}`;
    return `Point ${Number(point[2]) + 1} of ${run} cannot be read: ${PARTS[point[3] ?? ""] ?? "it"} is missing or out of range.`;
  }
  if (/^runs\.\d+\.points$/.test(path)) return `A line may hold ${MAX_POINTS} points at most.`;
  if (path.startsWith("settings")) return "A setting of the line is missing or out of range.";
  if (path === "number") return "The line needs a number.";
  return "It is not a run document of this version.";
}

/** The first few reasons as one text, without repeats. */
export function documentRefusal(messages: readonly string[]): string {
  const sentences = [...new Set(messages.map(documentSentence))];
  return `This run cannot be saved. ${sentences.slice(0, 3).join(" ")}`;
}
