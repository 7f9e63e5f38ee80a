/** Published weights of long-radius 90 elbows, pounds, from one maker's B16.9 catalogue. Other fittings have no data here. */
import type { Nps } from "../run/document";

export const ELBOW_WEIGHT_SOURCE = "published B16.9 LR 90 weights (scribd.com/document/447724146)";

export const ELBOW_POUNDS: Readonly<Record<"STD" | "XS", readonly (readonly [Nps, number])[]>> = {
  STD: [
    ["1/2", 0.17],
    ["3/4", 0.17],
    ["1", 0.34],
    ["1-1/4", 0.58],
    ["1-1/2", 0.84],
    ["2", 1.5],
    ["2-1/2", 2.98],
    ["3", 4.68],
    ["4", 8.9],
    ["5", 15.1],
    ["6", 23.5],
    ["8", 47],
    ["10", 83],
    ["12", 123],
    ["14", 158],
    ["16", 207],
    ["18", 263],
    ["20", 323],
    ["24", 468],
  ],
  XS: [
    ["1/2", 0.22],
    ["3/4", 0.23],
    ["1", 0.45],
    ["1-1/4", 0.77],
    ["1-1/2", 1.12],
    ["2", 2.07],
    ["2-1/2", 3.95],
    ["3", 6.33],
    ["4", 12.4],
    ["5", 21.4],
    ["6", 35.3],
    ["8", 71],
    ["10", 112],
    ["12", 162],
    ["14", 208],
    ["16", 273],
    ["18", 347],
    ["20", 428],
    ["24", 622],
  ],
};
