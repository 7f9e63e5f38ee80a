/** Numbers of dimensions step aside along their own lines where a leader has to pass, or where they stand on pipe. */
import { textBox } from "./dimension-lines";
import type { DimensionText } from "./dimension-shape";
import { turnedInk, type InkMap } from "./ink-map";
import { boxesMeet, segmentInBox, type Segment, type TurnedBox } from "./plane";

export interface PlacedNumber {
  readonly text: DimensionText;
  readonly box: TurnedBox;
}

/** Paper kept between a number and labels or other numbers, and between it and a leader, mm. */
const MARGIN = 0.5;
const LEADER_MARGIN = 0.3;

/**
 * @param taken boxes of everything else that is written
 * @returns the numbers' boxes in the same order, each on the first of its places that is free of leaders, words and pipe, or where it was
 */
export function numbersAside(numbers: readonly PlacedNumber[], taken: readonly TurnedBox[], leaders: readonly Segment[], heavy: InkMap): readonly TurnedBox[] {
  const boxes = numbers.map(({ box }) => box);
  const clear = (box: TurnedBox): boolean => turnedInk(heavy, box) === 0 && !leaders.some(({ from, to }) => segmentInBox(from, to, box, LEADER_MARGIN) > 0);
  numbers.forEach(({ text, box }, i) => {
    if (clear(box)) return;
    const free = text.places.map((at) => textBox(text, at)).find((place) =>
      clear(place) && !taken.some((other) => boxesMeet(other, place, MARGIN)) && !boxes.some((other, j) => j !== i && boxesMeet(other, place, MARGIN)));
    if (free) boxes[i] = free;
  });
  return boxes;
}
