/** Flat lists filled by a plain loop: the built-in `from` walks an iterator, which takes many times as long. */

export function integersOf<T>(list: readonly T[], value: (item: T, place: number) => number): Int32Array {
  const flat = new Int32Array(list.length);
  for (let i = 0; i < list.length; i++) flat[i] = value(list[i]!, i);
  return flat;
}

export function fractionsOf<T>(list: readonly T[], value: (item: T, place: number) => number): Float64Array {
  const flat = new Float64Array(list.length);
  for (let i = 0; i < list.length; i++) flat[i] = value(list[i]!, i);
  return flat;
}
