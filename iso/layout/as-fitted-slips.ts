/**
 * Slips of whoever wrote the points down, told by what would fit far better: a unit (the ratio of distances, which no
 * motion changes), two names changed over, one axis counted backwards (a mirror image), one point alone.
 */
import type { Vec3 } from "../geometry/types";
import { vecDistance } from "../geometry/vec3";
import { READ_AS, READ_AS_MM, type AsFittedDocument } from "./as-fitted-document";
import { fitMeasured, type Fitted, type WantedPlace } from "./as-fitted-fit";
import { pointName } from "./as-fitted-read";
import type { FittedFinding, FittedTolerances, Measured } from "./as-fitted-types";

/** Logarithm of a ratio of distances: a unit fits within this, and a spool is wrong beyond twice as much. */
const RATIO_FITS = 0.05;
/** Squares left over must fall to this share before a slip is spoken of: five times nearer. */
const FAR_BETTER = 1 / 25;
/** Faces of which every order is tried; of more, only pairs changed over. */
const MOST_ORDERS = 5;

type Places = ReadonlyMap<string, WantedPlace>;

export function slipFindings(document: AsFittedDocument, fitted: Fitted, places: Places, tolerances: FittedTolerances): readonly FittedFinding[] {
  const ratio = distanceRatio(fitted.measured, places);
  if (ratio !== null) {
    const unit = unitFinding(document, ratio);
    if (unit) return [unit];
  }
  const wide = Math.sqrt(fitted.squares / Math.max(1, fitted.measured.length)) > 2 * tolerances.positionMm;
  if (!wide) return [];
  return orderFinding(fitted, places, tolerances) ?? loneFinding(fitted, places, tolerances) ?? sizeFinding(ratio);
}

/** Measured over wanted distances by least squares; null with fewer than two centres. */
export function distanceRatio(measured: readonly Measured[], places: Places): number | null {
  let [top, bottom] = [0, 0];
  measured.forEach((a, i) => measured.slice(i + 1).forEach((b) => {
    const want = vecDistance(places.get(a.mark)!.position, places.get(b.mark)!.position);
    top += want * vecDistance(a.centre!, b.centre!);
    bottom += want * want;
  }));
  return bottom > 0 && top > 0 ? top / bottom : null;
}

function unitFinding({ readAs }: AsFittedDocument, ratio: number): FittedFinding | null {
  if (Math.abs(Math.log(ratio)) <= 10 * RATIO_FITS) return null;
  const other = READ_AS.find((unit) => Math.abs(Math.log((ratio * READ_AS_MM[unit]) / READ_AS_MM[readAs])) < RATIO_FITS);
  if (!other) return null;
  const [size, times] = ratio > 1 ? ["long", ratio] : ["short", 1 / ratio];
  return {
    code: "unit", tone: "wrong", mend: { kind: "read-as", readAs: other }, mendWords: `Read them as ${other}`,
    sentence: `The measured distances are ${times.toPrecision(3)} times too ${size} for the sheet: these numbers are ${other}, not ${readAs}.`,
  };
}

interface Order {
  readonly names: Readonly<Record<string, string>>;
  readonly flipped: boolean;
  /** How many things were changed. */
  readonly changes: number;
}

/** Names changed over, or the mirror image, when that fits far better; the fewest changes win among equals. */
function orderFinding(fitted: Fitted, places: Places, { positionMm }: FittedTolerances): FittedFinding[] | null {
  const faces = fitted.measured.filter((one) => places.get(one.mark)!.direction !== null).map((one) => one.mark);
  const base = solid(fitted.measured, places) ? fitted.measured.map((one) => ({ ...one, axis: null })) : fitted.measured;
  const plain = fitMeasured(base, places, "");
  if (!plain || plain.free !== "nothing") return null;
  const cases = orders(faces).flatMap((order) => [order, { ...order, flipped: true, changes: order.changes + 1 }]).map((order) => {
    const fit = fitMeasured(base.map((one) => changed(one, order)), places, "");
    return { order, squares: fit?.free === "nothing" ? fit.squares : Infinity };
  });
  const limit = Math.max(plain.squares * FAR_BETTER, 0);
  const good = cases.filter(({ order, squares }) => order.changes > 0 && squares < limit && Math.sqrt(squares / base.length) < 2 * positionMm);
  const least = Math.min(...good.map(({ squares }) => squares));
  const best = good.filter(({ squares }) => squares <= 4 * least + 1).sort((a, b) => a.order.changes - b.order.changes || a.squares - b.squares)[0];
  return best ? orderSentences(best.order) : null;
}

/** Centres alone hold the turn. */
function solid(measured: readonly Measured[], places: Places): boolean {
  return fitMeasured(measured.map((one) => ({ ...one, axis: null })), places, "")?.free === "nothing";
}

function changed(one: Measured, { names, flipped }: Order): Measured {
  const turned = (v: Vec3 | null): Vec3 | null => (v && flipped ? [-v[0], v[1], v[2]] : v);
  return { mark: names[one.mark] ?? one.mark, centre: turned(one.centre), axis: turned(one.axis), holes: one.holes.map((hole) => turned(hole)!) };
}

function orders(marks: readonly string[]): Order[] {
  const none: Order = { names: {}, flipped: false, changes: 0 };
  if (marks.length > MOST_ORDERS) {
    return [none, ...marks.flatMap((a, i) => marks.slice(i + 1).map((b): Order => ({ names: { [a]: b, [b]: a }, flipped: false, changes: 1 })))];
  }
  return permutations(marks).map((to) => {
    const moved = marks.flatMap((mark, i) => (to[i] === mark ? [] : [[mark, to[i]!] as const]));
    return { names: Object.fromEntries(moved), flipped: false, changes: Math.max(0, moved.length - 1) };
  });
}

function permutations(marks: readonly string[]): string[][] {
  if (marks.length < 2) return [[...marks]];
  return marks.flatMap((first, i) => permutations([...marks.slice(0, i), ...marks.slice(i + 1)]).map((rest) => [first, ...rest]));
}

function orderSentences({ names, flipped }: Order): FittedFinding[] {
  const moved = Object.entries(names);
  const findings: FittedFinding[] = [];
  if (flipped) findings.push({ code: "mirror", tone: "wrong", mend: { kind: "flip" }, mendWords: "Count E the other way", sentence: "The points fit as a mirror image, which no spool can be turned into: one direction was counted backwards, or two columns are changed over. E, N and U must be right-handed: facing north, east is on the right." });
  if (moved.length > 0) {
    const words = moved.length === 2 ? `ends ${moved[0]![0]} and ${moved[0]![1]} are changed over` : `the ends' names are mixed: ${moved.map(([from, to]) => `what is called end ${from} fits end ${to}`).join(", ")}`;
    findings.push({ code: "names", tone: "wrong", mend: { kind: "rename", names }, mendWords: moved.length === 2 ? "Change them over" : "Name them so", sentence: `It fits far better when ${words}.` });
  }
  return findings;
}

/** One face without which all the others fit: measured wrong, or truly off. */
function loneFinding(fitted: Fitted, places: Places, { positionMm }: FittedTolerances): FittedFinding[] | null {
  if (fitted.measured.length < 4) return null;
  const without = fitted.measured.map((one) => ({ mark: one.mark, fit: fitMeasured(fitted.measured.filter((other) => other !== one), places, "") }));
  const good = without.filter(({ fit }) => fit?.free === "nothing" && fit.squares < fitted.squares * FAR_BETTER && Math.sqrt(fit.squares / fit.measured.length) < positionMm);
  if (good.length !== 1) return null;
  const name = pointName({ of: good[0]!.mark, what: "centre" });
  return [{ code: "lone", tone: "warn", mend: { kind: "leave-out", of: good[0]!.mark }, mendWords: `Leave ${name.toLowerCase()} out of the fit`, sentence: `${name} alone does not fit; the others do. Measure it again before it is called off.` }];
}

function sizeFinding(ratio: number | null): FittedFinding[] {
  if (ratio === null || Math.abs(Math.log(ratio)) <= RATIO_FITS) return [];
  return [{ code: "size", tone: "wrong", sentence: `The measured distances are ${ratio.toPrecision(3)} times the sheet's, which no unit explains. Check that this is the spool of this sheet.` }];
}
