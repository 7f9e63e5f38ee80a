/** Boxes of texts on a page, turned as the text is, and whether two of them overlap: what a reader would see collide. */
import { expect } from "vitest";
import { frameBox, type PaperPoint, type SheetPage, type TextItem } from "@/iso";
import { measureText } from "@/fonts/widths";

/** The word across a page lies under everything and is no label. */
export const isAcross = (item: TextItem): boolean => item.layer === "state" && item.ink === "pale";

export const textsOf = (page: SheetPage): TextItem[] => page.items.filter((item) => item.type === "text" && item.text !== "" && !isAcross(item)) as TextItem[];

/** How far a text reaches below its baseline, in capitals: a third where it has descenders or brackets, else a slash's tenth. */
const descentOf = (text: string): number => (/[gjpqy()[\]{},;|_Q@$]/.test(text) ? 0.32 : 0.1);

/** Four corners of the ink of a text: advance by capital height and what hangs below the baseline. */
export function textCorners(item: TextItem, descent = descentOf(item.text)): PaperPoint[] {
  const width = measureText(item.text, item.capMm, item.face);
  const left = item.anchor === "start" ? 0 : item.anchor === "end" ? -width : -width / 2;
  const [c, s] = [Math.cos(item.rotateRad), Math.sin(item.rotateRad)];
  const place = (x: number, y: number): PaperPoint => [item.at[0] + x * c - y * s, item.at[1] + x * s + y * c];
  return [place(left, -item.capMm), place(left + width, -item.capMm), place(left + width, descent * item.capMm), place(left, descent * item.capMm)];
}

/** True when two convex quadrilaterals share more than `slack` mm along every separating axis. */
export function cornersOverlap(a: readonly PaperPoint[], b: readonly PaperPoint[], slack: number): boolean {
  for (const corners of [a, b]) {
    for (let i = 0; i < 4; i += 1) {
      const [p, q] = [corners[i]!, corners[(i + 1) % 4]!];
      const length = Math.hypot(q[0] - p[0], q[1] - p[1]);
      if (length === 0) continue;
      const normal = [-(q[1] - p[1]) / length, (q[0] - p[0]) / length] as const;
      const along = (points: readonly PaperPoint[]) => points.map(([x, y]) => x * normal[0] + y * normal[1]);
      const [pa, pb] = [along(a), along(b)];
      if (Math.min(Math.max(...pa), Math.max(...pb)) - Math.max(Math.min(...pa), Math.min(...pb)) <= slack) return false;
    }
  }
  return true;
}

/** Pairs of texts of a page that overlap. */
export function overlappingTexts(page: SheetPage, slack = 0.05): string[] {
  const boxes = textsOf(page).map((item) => ({ item, corners: textCorners(item) }));
  return boxes.flatMap((one, index) =>
    boxes.slice(index + 1).filter((other) => cornersOverlap(one.corners, other.corners, slack)).map((other) => `${one.item.text} | ${other.item.text}`));
}

/** What every page must hold to be readable: lettering of 2.5 mm and more, all of it inside the frame, no text on a text. */
export function expectReadable(page: SheetPage, what: string, leastMarginMm?: number): void {
  const frame = frameBox(page.widthMm, page.heightMm, leastMarginMm);
  for (const item of textsOf(page)) {
    expect(item.capMm, `${what}: ${item.text}`).toBeGreaterThanOrEqual(LEAST_CAP_MM);
    const outside = textCorners(item).find(([x, y]) => x < frame.minX || x > frame.maxX || y < frame.minY || y > frame.maxY);
    expect(outside, `${what}, ${page.name}: "${item.text}" leaves the frame`).toBeUndefined();
  }
  expect(overlappingTexts(page), `${what}, ${page.name}`).toEqual([]);
}

/** ISO 3098's least lettering (from memory), less the noise of a division. */
const LEAST_CAP_MM = 2.5 - 1e-9;
