/** Random run documents: walks along the axes with offsets, slopes, valves, flanges, branches. Nothing about them is sensible but their shape. */
import type { Item, RunDocument } from "@/iso";
import { end, flange, joint, outlet, pipe, reducer, RunBuilder, support, tee, valve } from "../../fixtures/run-builder";
import { seeded } from "./draw-helpers";

const WAYS = ["E", "W", "N", "S", "U", "D"] as const;
const BACK: Record<string, string> = { E: "W", W: "E", N: "S", S: "N", U: "D", D: "U" };

export function randomRun(seed: number, points: number): RunDocument {
  const random = seeded(seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  const length = (): string => `${150 + Math.floor(random() * random() * 9000)}`;
  const builder = new RunBuilder(`R-${seed}`, "metric", { pipe: pipe(pick(["2", "4", "6"])) }).start(flange({ text: "NOZZLE N1" }));
  let way: string = pick(WAYS);
  const branches: number[] = [];
  for (let i = 1; i < points; i++) {
    const straight = random() < 0.45;
    if (!straight) way = pick(WAYS.filter((w) => w !== way && w !== BACK[way]));
    const item: Item = straight ? pick([valve({ tag: `V-${i}` }), joint, support("PS"), flange(), tee(), outlet("1"), { kind: "none" as const }, reducer("2")]) : { kind: "none" };
    if (item.kind === "tee" || item.kind === "outlet") branches.push(i);
    if (random() < 0.12) builder.enu(`${Math.floor(random() * 1600) - 800}`, `${Math.floor(random() * 1600) - 800}`, random() < 0.5 ? "0" : `${Math.floor(random() * 1600) - 800}`, item);
    else builder.go(way, length(), i === points - 1 ? end("continued", "R-NEXT") : item);
  }
  for (const at of branches) builder.branch(at).go(pick(WAYS), length()).go(pick(WAYS), length(), end("open", "DRAIN"));
  return builder.done();
}
