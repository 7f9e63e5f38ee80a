/** Blocks of a page that stay whole, one under another, running on to further pages. */
import type { DisplayItem } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";

export interface Block {
  readonly heightMm: number;
  readonly items: (box: PaperBox) => DisplayItem[];
}

export interface Stacked {
  readonly pages: readonly (readonly DisplayItem[])[];
  /** Where the last page's next block would begin. */
  readonly y: number;
}

/** Stacks blocks in a room of each page; at least one page. A block taller than the room stands alone and is for its maker to split. */
export function stackedBlocks(blocks: readonly Block[], room: PaperBox, gapMm: number): Stacked {
  const pages: DisplayItem[][] = [[]];
  let y = room.minY;
  for (const block of blocks) {
    if (y + block.heightMm > room.maxY && y > room.minY) {
      pages.push([]);
      y = room.minY;
    }
    pages.at(-1)!.push(...block.items({ ...room, minY: y, maxY: y + block.heightMm }));
    y += block.heightMm + gapMm;
  }
  return { pages, y };
}

/** Blocks side by side as one: each gets its share of the width. */
export function besideBlocks(blocks: readonly Block[], across: number, gapMm: number): Block {
  return {
    heightMm: Math.max(0, ...blocks.map(({ heightMm }) => heightMm)),
    items: (box) => {
      const each = (box.maxX - box.minX - (across - 1) * gapMm) / across;
      return blocks.flatMap((block, i) => block.items({ ...box, minX: box.minX + i * (each + gapMm), maxX: box.minX + i * (each + gapMm) + each }));
    },
  };
}

/** A list in rows of so many. */
export function rowsOf<T>(list: readonly T[], across: number): (readonly T[])[] {
  return Array.from({ length: Math.ceil(list.length / across) }, (_, row) => list.slice(row * across, (row + 1) * across));
}
