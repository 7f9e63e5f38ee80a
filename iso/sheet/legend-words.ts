/** What the letters on a sheet stand for. Terms of the trade; marks differ between firms, so each set prints its own. */
import type { JointKind } from "../run/model-types";

export const ABBREVIATIONS: readonly (readonly [string, string])[] = [
  ["BE", "bevelled end"], ["BOP", "bottom of pipe"], ["BW", "butt weld"], ["CCW, CW", "counter-clockwise, clockwise, looking along flow"], ["CL", "centre line"],
  ["E, W, N, S, U, D", "plant east, west, north, south, up, down"], ["EL", "elevation"], ["FFW", "field-fit weld: one end is supplied longer and cut to fit"], ["FOF", "face of flange"],
  ["FW", "field weld"], ["LR, SR", "long-radius, short-radius elbow"], ["NDE", "non-destructive examination"], ["NPS, DN", "nominal pipe size, inches and millimetres"], ["NTS", "not to scale"],
  ["OD", "outside diameter"], ["P1, P2", "cut pieces"], ["PMI", "positive material identification"], ["PWHT", "post-weld heat treatment"], ["R1, R2", "repairs of one weld"], ["REV", "revision"],
  ["RF, RTJ, FF", "raised face, ring joint, flat face"], ["SCH, STD, XS", "schedule, standard, extra strong wall"], ["SW, THD", "socket weld, threaded"], ["VIF", "verify in field: the dimension is not verified"], ["WPS", "welding procedure specification"],
  ["( )", "a repeated or computed dimension, for reference"], ["*", "a take-out from memory: measure the fitting first"],
];

export const WELD_TYPES: Readonly<Record<JointKind, string>> = {
  butt: "round the pipe, both ends prepared as the WPS says; numbered", socket: "fillet at a socket, the pipe pulled back from the bottom; numbered", "slip-on": "fillets at hub and face of a slip-on flange; numbered",
  branch: "branch or outlet to its run; numbered", mitre: "butt weld between two ends cut off square; numbered", attachment: "support or lug to the pipe; no number",
  threaded: "screwed, its make-up is in the cut length; no number", bolted: "flanged, with gasket and bolts; no number",
};

export const END_CUTS: readonly (readonly [string, string])[] = [
  ["BEVEL", "bevel, land and gap as the WPS says"], ["SQUARE", "cut square: sockets and slip-ons"], ["MITRE", "cut off square by the angle given"], ["SADDLE", "cut to the run's round, by template"], ["THREAD", "threaded after cutting"],
];
