/** The trade's words for any well-formed key, whether a table has it or not. */

const VALVES: Readonly<Record<string, string>> = {
  gate: "gate valve", globe: "globe valve", check: "swing check valve", ball: "ball valve, long pattern", "ball-short": "ball valve, short pattern",
  butterfly: "butterfly valve", "butterfly-offset": "butterfly valve, offset disc",
};
const VALVE_ENDS: Readonly<Record<string, string>> = {
  flanged: "flanged, face to face", butt: "butt-weld, end to end", socket: "socket-weld, socket bottom to socket bottom", threaded: "threaded, end to end",
};
const FORGED: Readonly<Record<string, string>> = {
  "sw-90": "90", "sw-45": "45", "th-90": "90", "th-45": "45", tee: "tee", cross: "cross", coupling: "coupling", "half-coupling": "half coupling", cap: "cap", union: "union",
};
const ENDS: Readonly<Record<string, string>> = { butt: "butt-weld", socket: "socket-weld", threaded: "threaded", flanged: "flanged" };

type Reader = (parts: readonly string[]) => string | null;

const READERS: Readonly<Record<string, Reader>> = {
  elbow: ([name, nps]) => `${(name ?? "").toUpperCase().replace("-", " ")} elbow NPS ${nps}, centre to end`,
  return: ([radius, part, nps]) => `${(radius ?? "").toUpperCase()} 180 return NPS ${nps}, ${part === "back" ? "back to face" : "centre to centre"}`,
  "tee-run": (pair) => `tee NPS ${sizes(pair)}, centre to run end`,
  "tee-branch": (pair) => `tee NPS ${sizes(pair)}, centre to branch end`,
  "cross-run": (pair) => `cross NPS ${sizes(pair)}, centre to run end`,
  "cross-branch": (pair) => `cross NPS ${sizes(pair)}, centre to branch end`,
  reducer: (pair) => `reducer NPS ${sizes(pair)}, end to end`,
  cap: ([nps]) => `cap NPS ${nps}, length`,
  "cap-heavy": ([nps]) => `cap NPS ${nps} of heavy wall, length`,
  "stub-end": ([pattern, nps]) => `stub end NPS ${nps}, ${pattern}, face to end`,
  "flange-hub": ([type, c, nps]) => `${type} flange class ${c} NPS ${nps}, length through hub`,
  "flange-thickness": ([c, nps]) => `flange class ${c} NPS ${nps}, thickness`,
  "flange-socket": ([, nps]) => `socket-weld flange NPS ${nps}, socket depth`,
  valve: ([name, c, nps, ends]) => `${VALVES[name ?? ""] ?? name} class ${c} NPS ${nps}, ${VALVE_ENDS[ends ?? ""] ?? ends}`,
  outlet: ([branch, run]) => `outlet NPS ${branch} on ${run}, height`,
  socket: ([fitting, c, nps]) => (fitting === "depth" ? `socket depth, least, class ${c} NPS ${nps}` : `socket ${FORGED[fitting ?? ""] ?? fitting} class ${c} NPS ${nps}, ${socketMeasure(fitting)}`),
  threaded: ([fitting, c, nps]) => `threaded ${FORGED[fitting ?? ""] ?? fitting} class ${c} NPS ${nps}, ${isTurned(fitting) ? "centre to end" : "end to end"}`,
  thread: ([, nps]) => `thread engagement NPS ${nps}, hand-tight and wrench make-up`,
  weight: ([part, grade, ...size]) => `weight of ${partWords(part ?? "")}${gradeWords(part ?? "", grade ?? "")} NPS ${size.join(" x ")}`,
};

/** Words of a key, or null for one that is of no known form. */
export function keyWords(key: string): string | null {
  const [kind, ...parts] = key.split(":");
  const reader = READERS[kind ?? ""];
  return reader && parts.length > 0 ? reader(parts) : null;
}

/** Whether the number of a key is kilograms rather than millimetres. */
export function isWeightKey(key: string): boolean {
  return key.startsWith("weight:");
}

function sizes([large, small]: readonly string[]): string {
  return small === undefined || small === large ? String(large) : `${large} x ${small}`;
}

function isTurned(fitting: string | undefined): boolean {
  return /90|45|tee|cross/.test(fitting ?? "");
}

function socketMeasure(fitting: string | undefined): string {
  if (isTurned(fitting)) return "centre to socket bottom";
  if (fitting === "cap") return "socket bottom to outside end";
  return fitting === "half-coupling" ? "socket bottom to far end" : "socket bottom to socket bottom";
}

/** "valve-gate-flanged" to "gate valve, flanged,"; "socket-elbow-90-threaded" to "90 elbow, threaded,". */
function partWords(part: string): string {
  const valve = /^valve-(.+)-(flanged|butt|socket|threaded)$/.exec(part);
  if (valve) return `${VALVES[valve[1] ?? ""] ?? valve[1]}, ${ENDS[valve[2] ?? ""]},`;
  const ends = /-(butt|socket|threaded|flanged)$/.exec(part);
  const name = (ends ? part.slice(0, ends.index) : part).replace(/^socket-/, "").replace(/-/g, " ").replace(/elbow (90|45)/, "$1 elbow");
  return ends ? `${name}, ${ENDS[ends[1] ?? ""]},` : name;
}

function gradeWords(part: string, grade: string): string {
  if (grade === "") return "";
  return /^(valve|flange|socket|union|coupling|half|gasket|instrument|bolt)/.test(part) ? ` class ${grade}` : ` ${/^\d/.test(grade) ? `SCH ${grade}` : grade}`;
}
