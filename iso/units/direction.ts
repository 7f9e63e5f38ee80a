/**
 * Directions as people type them. Letters E W N S U D, alone or joined: UN is 45° up-north, NE north-east on the level,
 * UNE equal parts of all three. A letter, an angle and a letter turn from the first towards the second: N30E, E20U.
 * Two angles with a slash are azimuth (clockwise from plant north) and elevation: 045/30. Common practice of surveyors
 * and detailers; no standard is followed.
 */
import { AXIS_COMPONENT } from "../geometry/tolerances";
import { formatDecimal } from "./format";

export type ParsedDirection =
  | { readonly ok: true; readonly e: number; readonly n: number; readonly u: number; readonly understood: string }
  | { readonly ok: false; readonly message: string };

type Triple = readonly [number, number, number];

const AXES: Readonly<Record<string, Triple>> = {
  E: [1, 0, 0], W: [-1, 0, 0], N: [0, 1, 0], S: [0, -1, 0], U: [0, 0, 1], D: [0, 0, -1],
};
const WORDS: readonly (readonly [RegExp, string])[] = [
  [/EAST/g, "E"], [/WEST/g, "W"], [/NORTH/g, "N"], [/SOUTH/g, "S"], [/DOWN|DN/g, "D"], [/UP/g, "U"],
];
const EXAMPLE = "E, UN (45° up-north), N30E, or azimuth/elevation such as 045/30";
const RAD = Math.PI / 180;

/**
 * Reads a direction.
 * @returns a unit vector east, north, up and its echo, or one sentence saying what to type. Never throws.
 */
export function parseDirection(text: string): ParsedDirection {
  const typed = String(text).trim();
  let plain = typed.toUpperCase().replace(/\u00b0/g, "").replace(/[\s,+]+/g, "").replace(/[\u2010-\u2015\u2212]/g, "-");
  for (const [word, letter] of WORDS) plain = plain.replace(word, letter);
  plain = plain.replace(/(?<=[A-Z])-(?=[A-Z])/g, "");
  if (plain === "") return refusal(`Type a direction, ${EXAMPLE}.`);
  if (plain.length > 24) return refusal(`That is too long for a direction; type ${EXAMPLE}.`);
  const angles = /^(-?\d+(?:\.\d+)?)\/(-?\d+(?:\.\d+)?)$/.exec(plain);
  if (angles) return fromAngles(Number(angles[1]), Number(angles[2]));
  const turned = /^([EWNSUD])(\d+(?:\.\d+)?)([EWNSUD])$/.exec(plain);
  if (turned) return fromTurn(turned[1]!, Number(turned[2]), turned[3]!);
  if (/^[EWNSUD]{1,3}$/.test(plain)) return fromLetters(plain);
  return refusal(`"${typed.slice(0, 24)}" is not a direction; type ${EXAMPLE}.`);
}

function fromLetters(letters: string): ParsedDirection {
  const sum = [...letters].reduce<Triple>((a, l) => add(a, AXES[l]!, 1), [0, 0, 0]);
  const parts = sum.filter((c) => c !== 0).length;
  if (parts !== letters.length) return refusal(`${letters} names one axis twice; use each of east-west, north-south and up-down once.`);
  return direction(sum);
}

function fromTurn(first: string, angleDeg: number, second: string): ParsedDirection {
  const a = AXES[first]!;
  const b = AXES[second]!;
  if (a.some((c, i) => c !== 0 && b[i] !== 0)) return refusal(`${first} and ${second} lie on one axis; turn towards another one, such as N30E.`);
  if (angleDeg > 90) return refusal(`Turn from ${first} towards ${second} by 0 to 90 degrees.`);
  return direction(add(scale(a, Math.cos(angleDeg * RAD)), b, Math.sin(angleDeg * RAD)));
}

function fromAngles(azimuthDeg: number, elevationDeg: number): ParsedDirection {
  if (Math.abs(azimuthDeg) > 360) return refusal("The azimuth goes from 0 to 360 degrees, clockwise from plant north.");
  if (Math.abs(elevationDeg) > 90) return refusal("The elevation goes from -90 (down) to 90 (up) degrees.");
  const level = Math.cos(elevationDeg * RAD);
  return direction([Math.sin(azimuthDeg * RAD) * level, Math.cos(azimuthDeg * RAD) * level, Math.sin(elevationDeg * RAD)]);
}

/** Unit vector with float dust swept off, so that an axis is exactly an axis. */
function direction(raw: Triple): ParsedDirection {
  const size = Math.hypot(...raw);
  const [e, n, u] = raw.map((c) => sweep(c / size)) as [number, number, number];
  return { ok: true, e, n, u, understood: directionWords(e, n, u) };
}

function sweep(c: number): number {
  if (Math.abs(c) < AXIS_COMPONENT) return 0;
  return Math.abs(Math.abs(c) - 1) < AXIS_COMPONENT ? Math.sign(c) : c;
}

/** A direction in words: `east`, `45° up, north`, `azimuth 30°`, `30° up, azimuth 45°`. The vector need not be a unit one. */
export function directionWords(e: number, n: number, u: number): string {
  const level = Math.hypot(e, n);
  if (level < AXIS_COMPONENT) return u === 0 ? "no direction" : u > 0 ? "up" : "down";
  const elevation = Math.atan2(u, level) / RAD;
  const heading = headingWords(e, n);
  if (Math.abs(elevation) < AXIS_COMPONENT) return heading;
  return `${formatDecimal(Math.abs(elevation), 2)}° ${elevation > 0 ? "up" : "down"}, ${heading}`;
}

function headingWords(e: number, n: number): string {
  const azimuth = (Math.atan2(e, n) / RAD + 360) % 360;
  const eighth = Math.round(azimuth / 45);
  const names = ["north", "north-east", "east", "south-east", "south", "south-west", "west", "north-west", "north"];
  return Math.abs(azimuth - eighth * 45) < AXIS_COMPONENT / RAD ? names[eighth]! : `azimuth ${formatDecimal(azimuth, 2)}°`;
}

function add(a: Triple, b: Triple, k: number): Triple {
  return [a[0] + b[0] * k, a[1] + b[1] * k, a[2] + b[2] * k];
}

function scale(a: Triple, k: number): Triple {
  return [a[0] * k, a[1] * k, a[2] * k];
}

function refusal(message: string): ParsedDirection {
  return { ok: false, message };
}
