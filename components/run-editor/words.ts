/** A space that never ends a line. */
export const NBSP = "\u00a0";

/** "1 weld", "3 welds". */
export function counted(n: number, one: string, many = `${one}s`): string {
  return `${n} ${n === 1 ? one : many}`;
}
