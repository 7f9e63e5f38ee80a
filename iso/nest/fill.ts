/**
 * Filling one room with the most worth: a bounded knapsack by dynamic programming over whole lengths. One byte per part and
 * room says whether the part was taken, so that the filling of any room, and of any room with a given longest part, is read
 * back from one table.
 */
export interface FillItem {
  readonly index: number;
  readonly weight: number;
  readonly profit: number;
  readonly most: number;
}

/** Several pieces of one item, taken together: 1, 2, 4, ... and the remainder. */
interface Part {
  readonly item: FillItem;
  readonly count: number;
}

export interface FillTable {
  /** Shortest first. */
  readonly parts: readonly Part[];
  /** Greatest worth within each room. */
  readonly best: Float64Array;
  readonly took: Uint8Array;
  readonly width: number;
}

/** Time: parts × capacity. Items without profit are left out. */
export function fillTable(items: readonly FillItem[], capacity: number): FillTable {
  const width = Math.max(0, capacity) + 1;
  const parts = items.filter((item) => item.profit > 0 && item.weight <= capacity).sort((a, b) => a.weight - b.weight).flatMap(partsOf);
  const best = new Float64Array(width);
  const took = new Uint8Array(parts.length * width);
  parts.forEach(({ item, count }, k) => {
    const weight = item.weight * count;
    const profit = item.profit * count;
    const row = k * width;
    for (let c = capacity; c >= weight; c--) {
      const value = best[c - weight]! + profit;
      if (value > best[c]!) {
        best[c] = value;
        took[row + c] = 1;
      }
    }
  });
  return { parts, best, took, width };
}

function partsOf(item: FillItem): Part[] {
  const parts: Part[] = [];
  for (let left = item.most, size = 1; left > 0; left -= size, size *= 2) parts.push({ item, count: Math.min(size, left) });
  return parts;
}

/**
 * Counts by the items' own index that reach the greatest worth within a room.
 * @param longest part that must be taken, with none after it; absent: all parts may be.
 * @returns null when that part does not fit.
 */
export function fillCounts({ parts, took, width }: FillTable, room: number, length: number, longest?: number): number[] | null {
  const counts = new Array<number>(length).fill(0);
  let c = room;
  for (let k = longest ?? parts.length - 1; k >= 0; k--) {
    const { item, count } = parts[k]!;
    const forced = k === longest;
    if (forced && item.weight * count > c) return null;
    if (!forced && took[k * width + c] === 0) continue;
    counts[item.index]! += count;
    c -= item.weight * count;
  }
  return counts;
}
