/** A screen without a fine pointer: focusing a field there raises the keyboard over half of it. */
export function isTouchScreen(): boolean {
  return typeof window.matchMedia === "function" && window.matchMedia("(pointer: coarse)").matches;
}
