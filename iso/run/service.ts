/**
 * What a line carries from point to point: specification, material, insulation, tracing. A point's `starts` changes it
 * from there on downstream and into the branches that leave after it; at a run's own first point it holds for the run.
 */
import type { PlacedPoint, Service } from "./build-types";
import type { LineSettings, Pipe, Point, Run } from "./document";
import type { LineBreak } from "./model-types";

const FIELDS = ["specification", "material", "insulation", "tracing"] as const;

/** What a run begins with: its pipe's own words, what the fitting it leaves from carries on, else the line's. */
export function firstService(run: Run, start: { readonly serviceOut: Service } | null, pipe: Pipe, firstPoint: Point | undefined, settings: LineSettings): Service {
  const own: Service = start
    ? { ...start.serviceOut, ...(run.pipe ? { specification: pipe.specification, material: pipe.material } : {}) }
    : { specification: pipe.specification, material: pipe.material, insulation: settings.asEntered.insulation, tracing: "" };
  return firstPoint ? serviceAfter(own, firstPoint) : own;
}

/** What holds after a point. */
export function serviceAfter(before: Service, point: Point): Service {
  const { starts } = point;
  if (!starts) return before;
  const of = (field: (typeof FIELDS)[number]): string => starts[field] ?? before[field];
  return { specification: of("specification"), material: of("material"), insulation: of("insulation"), tracing: of("tracing") };
}

/** The pipe in the specification and material that hold. */
export function pipeOfService(pipe: Pipe, service: Service): Pipe {
  if (pipe.material === service.material && pipe.specification === service.specification) return pipe;
  return { ...pipe, material: service.material, specification: service.specification };
}

/** What changes at each point, in flow order of their runs: one break per thing that changes. */
export function lineBreaks(points: readonly PlacedPoint[]): LineBreak[] {
  return points.flatMap((p) => FIELDS.filter((field) => p.serviceIn[field] !== p.serviceOut[field])
    .map((what) => ({ pointId: p.point.id, position: p.position, what, before: p.serviceIn[what], after: p.serviceOut[what] })));
}

/** Per point, what the line carries there besides what its pieces say, as canonical text; empty where nothing starts anywhere. */
export function carriedServices(points: readonly PlacedPoint[]): ReadonlyMap<string, string> {
  if (points.every((p) => p.point.starts === undefined)) return new Map();
  return new Map(points.map((p) => [p.point.id, JSON.stringify([p.serviceIn, p.serviceOut].map((s) => [s.specification, s.insulation, s.tracing]))]));
}
