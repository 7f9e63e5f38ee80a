/** Lists of labels by cell, linked in flat arrays: a label is put in and taken out tens of thousands of times a sheet. */
export const NONE = -1;

export class CellLists {
  private readonly head: Int32Array;
  private item: Int32Array = new Int32Array(4096);
  private next: Int32Array = new Int32Array(4096);
  private free = NONE;
  private used = 0;

  constructor(cells: number) {
    this.head = new Int32Array(cells).fill(NONE);
  }

  first(cell: number): number {
    return this.head[cell]!;
  }

  after(node: number): number {
    return this.next[node]!;
  }

  label(node: number): number {
    return this.item[node]!;
  }

  add(cell: number, label: number): void {
    let node = this.free;
    if (node !== NONE) this.free = this.next[node]!;
    else {
      node = this.used++;
      if (node >= this.item.length) [this.item, this.next] = [doubled(this.item), doubled(this.next)];
    }
    this.item[node] = label;
    this.next[node] = this.head[cell]!;
    this.head[cell] = node;
  }

  remove(cell: number, label: number): void {
    let before = NONE;
    for (let node = this.head[cell]!; node !== NONE; before = node, node = this.next[node]!) {
      if (this.item[node] !== label) continue;
      if (before === NONE) this.head[cell] = this.next[node]!;
      else this.next[before] = this.next[node]!;
      this.next[node] = this.free;
      this.free = node;
      return;
    }
  }
}

function doubled(list: Int32Array): Int32Array {
  const longer = new Int32Array(list.length * 2);
  longer.set(list);
  return longer;
}
