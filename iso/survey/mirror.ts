/** Marks that tapes alone leave on either side: the mirror image fits the readings as well as the place taken. */
import { INCH_MM } from "../units/length";
import type { UnitSystem } from "../run/document";
import { vecDistance } from "../geometry/vec3";
import { mirrored } from "./best-places";
import { minimiseSquares } from "./minimise";
import type { Places } from "./observations";
import type { SurveyFinding } from "./survey-read";
import type { Adjustment, SurveyNetwork } from "./survey-types";
import { joined, smallLength } from "./survey-words";

const ROUNDS = 20;
/** A place is as good as another when its weighted squares are no more than this above: three deviations, squared. */
const AS_GOOD = 9;
/** Nearer images are one place to whoever fits pipe, mm. */
const APART_MM = INCH_MM / 2;
/** A floating tetrahedron's one image is that of the whole, told apart. */
const WHOLE = 4;

export function mirrorFindings(network: SurveyNetwork, adjustment: Adjustment, units: UnitSystem): SurveyFinding[] {
  const { coordinates, loose, weightedSquares, datumDefect } = adjustment;
  if (datumDefect === 6 && network.marks.length <= WHOLE) return [];
  const free = network.marks.filter((mark) => !network.fixed.has(mark));
  return free.filter((mark) => !loose.includes(mark)).flatMap((mark) => {
    const ties = network.observations.filter((o) => o.from === mark || o.to === mark);
    const turned = ties.every((o) => o.type === "distance") ? mirrored(network, mark, coordinates) : null;
    if (!turned) return [];
    const other = minimiseSquares(network.observations, free, turned, ROUNDS);
    const apart = vecDistance(other.places.get(mark)!, coordinates.get(mark)!);
    if (datumDefect > 0 && sameShape(network.marks, coordinates, other.places)) return [];
    if (other.squares > weightedSquares + AS_GOOD || apart < APART_MM) return [];
    const partners = [...new Set(ties.map((o) => (o.to === mark ? o.from : o.to)))];
    const above = coordinates.get(mark)![2] - other.places.get(mark)![2];
    const side = Math.abs(above) > apart / 2 ? ` ${above > 0 ? "the upper" : "the lower"} place is taken` : " one of them is taken";
    return [{ code: "mirror", tone: "wrong" as const, readingIds: [], sentence: `Mark ${mark} could stand in two places ${smallLength(apart, units)} apart, on either side of ${joined(partners.slice(0, 3))};${side}. A level reading, an offset or a tape from another mark settles it.` }];
  });
}

/** Whether two sets of places differ by no more than a shift and a turn of the whole, judged by the distances between marks. */
function sameShape(marks: readonly string[], one: Places, two: Places): boolean {
  return marks.every((a, i) => marks.slice(0, i).every((b) => Math.abs(vecDistance(one.get(a)!, one.get(b)!) - vecDistance(two.get(a)!, two.get(b)!)) < APART_MM));
}
