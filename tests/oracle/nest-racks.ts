/** Invented racks and pieces for trials of the nesting, the same for the same seed. Lengths in sixteenths of an inch. */
import type { NestInput, NestStock } from "@/iso";
import { seededRandom as seeded } from "./random";

/** A shop's rack: two stock lengths to buy, offcuts with heats, pieces in sixteenths of an inch. */
export function seededShop(seed: number, most: number): NestInput {
  const random = seeded(seed);
  const whole = (from: number, to: number) => from + Math.floor(random() * (to - from + 1));
  const perLength = 0.01;
  const bought: NestStock[] = [
    { id: "20 ft", length: 3840, quantity: random() < 0.3 ? whole(20, 60) : null, cost: 3840 * perLength, heat: null },
    { id: "40 ft", length: 7680, quantity: null, cost: 7680 * perLength * 0.97, heat: null },
  ];
  const offcuts = Array.from({ length: whole(0, 15) }, (_, i): NestStock => {
    const length = whole(300, 3000);
    return { id: `offcut ${i + 1}`, length, quantity: 1, cost: length * perLength * 0.6, heat: `H${whole(1, 4)}` };
  });
  return {
    demands: Array.from({ length: whole(1, most) }, (_, i) => ({ length: whole(40, random() < 0.2 ? 3700 : 1600), heat: random() < 0.04 ? "H1" : null, marks: [`P${i + 1}`] })),
    stocks: [...bought, ...offcuts], kerf: 2, endTrim: random() < 0.5 ? 8 : 0, leastOffcut: 480, offcutValue: perLength * 0.6,
  };
}

/** Two lengths to buy, 15 offcuts, and 60 to 100 pieces all different. */
export function fullRack(seed: number): NestInput {
  const random = seeded(seed);
  const whole = (from: number, to: number) => from + Math.floor(random() * (to - from + 1));
  const offcuts = Array.from({ length: 15 }, (_, i): NestStock => {
    const length = whole(300, 3000);
    return { id: `offcut ${i + 1}`, length, quantity: 1, cost: length * 0.006, heat: `H${whole(1, 4)}` };
  });
  return {
    kerf: 2, endTrim: 8, leastOffcut: 480, offcutValue: 0.006,
    stocks: [{ id: "20 ft", length: 3840, quantity: null, cost: 38.4, heat: null }, { id: "40 ft", length: 7680, quantity: null, cost: 74.5, heat: null }, ...offcuts],
    demands: Array.from({ length: whole(60, 100) }, (_, i) => ({ length: whole(40, random() < 0.2 ? 3700 : 1600), heat: null, marks: [`P${i + 1}`] })),
  };
}
