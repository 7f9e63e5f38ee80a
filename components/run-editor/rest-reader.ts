/** Reads what is typed after an item's short word, word by word: sizes, classes, lengths, directions. */
import { NPS_SIZES, parseLength } from "@/iso";
import type { AxisName, Nps, RatingClass, UnitSystem } from "@/iso";

const CLASSES: readonly RatingClass[] = [150, 300, 600, 900, 1500];
const AXIS_BY_WORD: Readonly<Record<string, AxisName>> = {
  e: "E", w: "W", n: "N", s: "S", u: "U", d: "D", east: "E", west: "W", north: "N", south: "S", up: "U", down: "D",
  bottom: "D", top: "U", fob: "D", fot: "U", bop: "D",
};
/** The second half of a length typed with a space: the fraction of "9 1/2". */
const FRACTION = /^\d+\/\d+["″]?$/;

/** Thrown by the readers of an item's rest, caught where an item is read: its message is the sentence shown. */
export class RestRefusal extends Error {}

/** The words after an item's short word, taken from the left. */
export class RestReader {
  private at = 0;
  private readonly words: readonly string[];

  constructor(text: string, readonly units: UnitSystem) {
    this.words = text.split(" ").filter((word) => word !== "");
  }

  get done(): boolean {
    return this.at >= this.words.length;
  }

  /** The next word as typed, taken; "" at the end. */
  take(): string {
    const word = this.words[this.at] ?? "";
    this.at += 1;
    return word;
  }

  /** The next word in small letters, left where it is. */
  peek(): string {
    return (this.words[this.at] ?? "").toLowerCase();
  }

  /** All that is left, as typed. */
  rest(): string {
    const left = this.words.slice(this.at).join(" ");
    this.at = this.words.length;
    return left;
  }

  /** Takes a length over zero in mm. @throws RestRefusal saying what to type. */
  length(what: string): number {
    const first = this.take();
    const second = FRACTION.test(this.words[this.at] ?? "") && /\d$/.test(first) ? ` ${this.take()}` : "";
    const parsed = parseLength(`${first}${second}`, this.units);
    if (first === "" || !parsed.ok || parsed.mm <= 0) throw new RestRefusal(`Type ${what} as a length, such as ${this.units === "imperial" ? "8 or 1 1/2" : "200"}.`);
    return parsed.mm;
  }

  /** Takes a direction. @throws RestRefusal */
  axis(what: string): AxisName {
    const axis = axisOf(this.take());
    if (!axis) throw new RestRefusal(`Type ${what}: e, w, n, s, u or d.`);
    return axis;
  }

  /** Takes degrees from 0 to 360. @throws RestRefusal */
  degrees(what: string): number {
    const value = Number(this.take().replace(/°|deg$/i, "") || NaN);
    if (!(value >= 0 && value <= 360)) throw new RestRefusal(`Type ${what} in degrees from 0 to 360, clockwise.`);
    return value;
  }
}

export function axisOf(word: string): AxisName | null {
  return AXIS_BY_WORD[word.toLowerCase()] ?? null;
}

export function readClass(word: string): RatingClass | null {
  const value = Number(word.replace(/^(cl|class|#)/i, "").replace(/#$/, ""));
  return CLASSES.find((rating) => rating === value) ?? null;
}

/** "2", "1-1/2", `2"`, "1.5"; null when the tables have no such size. */
export function readNps(text: string): Nps | null {
  const plain = text.replace(/["″]$/, "").replace(/^(nps|x)/i, "").replace(" ", "-");
  const decimal: Readonly<Record<string, string>> = { "0.5": "1/2", ".5": "1/2", "0.75": "3/4", ".75": "3/4", "1.25": "1-1/4", "1.5": "1-1/2", "2.5": "2-1/2", "3.5": "3-1/2" };
  const named = decimal[plain] ?? plain;
  return NPS_SIZES.find((size) => size === named) ?? null;
}
