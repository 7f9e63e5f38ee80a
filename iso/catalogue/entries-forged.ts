/** Take-outs of forged fittings: socket-welding, threaded, and the engagement of a pipe thread. */
import { SOCKET_SOURCES, SOCKET_TUPLES } from "./b16-11-socket";
import {
  SOCKET_CAP_ENDS, THREADED_45S, THREADED_CENTRES, THREADED_CLASSES, THREADED_ENDS, THREADED_SOURCE,
} from "./b16-11-threaded";
import { engagementIn, THREADS, THREAD_SOURCE } from "./b1-20-1-threads";
import { entryOf, type Entry } from "./entry";
import { socketKey, threadedKey, threadEngagementKey, type SocketFitting, type ThreadedFitting } from "./keys";
import type { Memory } from "./row";
import { inchesMm } from "../units/length";

export function forgedEntries(): Entry[] {
  return [...sockets(), ...socketCaps(), ...threadedCentres(), ...threadedEnds(), ...threads()];
}

function sockets(): Entry[] {
  return SOCKET_TUPLES.flatMap(([c, nps, in90, mm90, in45, mm45, inTee, inCoupling, mmCoupling, mmHalf, inDepth, mmDepth]) => {
    const one = (fitting: SocketFitting, words: string, inches: number | null, mm: number | null, memory: Memory = "partial") =>
      inches === null && mm === null ? [] : [entryOf(socketKey(fitting, c, nps), `${words} class ${c} NPS ${nps}`, inches, mm, memory, SOCKET_SOURCES[c])];
    const heavy: Memory = c === 6000 ? "yes" : "partial";
    return [
      ...one("sw-90", "socket 90, centre to socket bottom,", in90, mm90, heavy),
      ...one("sw-45", "socket 45, centre to socket bottom,", in45, mm45),
      ...one("tee", "socket tee, centre to socket bottom,", inTee, mm90, heavy),
      ...one("cross", "socket cross, centre to socket bottom,", inTee, mm90, heavy),
      ...one("coupling", "coupling, laying length,", inCoupling, mmCoupling),
      ...one("half-coupling", "half coupling, laying length,", null, mmHalf),
      ...one("depth", "socket depth, least,", inDepth, mmDepth),
    ];
  });
}

function socketCaps(): Entry[] {
  return SOCKET_CAP_ENDS.flatMap(([nps, ...ends]) =>
    ([3000, 6000] as const).map((c, i) =>
      entryOf(socketKey("cap", c, nps), `socket cap, end wall, class ${c} NPS ${nps}`, ends[i]![0], ends[i]![1], "yes", THREADED_SOURCE)),
  );
}

const CENTRE_WORDS: readonly (readonly [ThreadedFitting, string])[] = [["th-90", "90"], ["tee", "tee"], ["cross", "cross"]];

function threadedCentres(): Entry[] {
  const of = (table: typeof THREADED_CENTRES, fitting: ThreadedFitting, word: string) =>
    table.flatMap(([nps, ...lengths]) => THREADED_CLASSES.map((c, i) =>
      entryOf(threadedKey(fitting, c, nps), `threaded ${word}, centre to end, class ${c} NPS ${nps}`, lengths[i]![0], lengths[i]![1], "yes", THREADED_SOURCE)));
  return [...CENTRE_WORDS.flatMap(([fitting, word]) => of(THREADED_CENTRES, fitting, word)), ...of(THREADED_45S, "th-45", "45")];
}

function threadedEnds(): Entry[] {
  return THREADED_ENDS.flatMap(([nps, coupling, ...caps]) => ([3000, 6000] as const).flatMap((c, i) => {
    const one = (fitting: ThreadedFitting, words: string, [inches, mm]: readonly [number, number]) =>
      entryOf(threadedKey(fitting, c, nps), `threaded ${words}, class ${c} NPS ${nps}`, inches, mm, "yes", THREADED_SOURCE);
    return [
      one("coupling", "coupling, end to end", coupling), one("half-coupling", "half coupling, end to end", [coupling[0] / 2, coupling[1] / 2]),
      one("cap", "cap, end to end", caps[i]!),
    ];
  }));
}

function threads(): Entry[] {
  return THREADS.map((row) => {
    const inches = engagementIn(row);
    const mm = Math.round(inchesMm(inches) * 10) / 10;
    return entryOf(threadEngagementKey(row[0]), `thread engagement NPS ${row[0]}, hand-tight and wrench make-up`, inches, mm, "yes", THREAD_SOURCE);
  });
}
