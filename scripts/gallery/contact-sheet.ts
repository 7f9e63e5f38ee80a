/** The contact sheet: one HTML page of all pictures, and one PNG of them scaled down. */
import { readFile, writeFile } from "node:fs/promises";
import path from "node:path";
import { PNG } from "pngjs";
import type { Picture } from "./picture";

const COLUMNS = 6;
const CELL = { width: 360, height: 250 } as const;
const GAP = 10;

/** Writes index.html and contact-sheet.png into the folder. */
export async function writeContactSheet(folder: string, pictures: readonly Picture[]): Promise<void> {
  await writeFile(path.join(folder, "index.html"), indexPage(folder, pictures));
  await writeFile(path.join(folder, "contact-sheet.png"), await contactPng(pictures));
}

function indexPage(folder: string, pictures: readonly Picture[]): string {
  const groups = [...new Set(pictures.map((picture) => picture.group))];
  const address = (file: string) => path.relative(folder, file).split(path.sep).map(encodeURIComponent).join("/");
  const figure = ({ file, link }: Picture) =>
    `<figure><a href="${address(link)}"><img loading="lazy" src="${address(file)}" alt=""></a><figcaption>${path.basename(file, ".png")}</figcaption></figure>`;
  const sections = groups.map((group) => `<h2>${group}</h2>\n<div>${pictures.filter((picture) => picture.group === group).map(figure).join("\n")}</div>`);
  return `<!doctype html>
<html lang="en"><meta charset="utf-8"><title>Quarterline: pictures</title>
<style>
body { font: 15px/1.4 sans-serif; margin: 24px; background: #f4f4f2; color: #1a1a1a }
div { display: grid; grid-template-columns: repeat(auto-fill, minmax(420px, 1fr)); gap: 16px }
figure { margin: 0 } img { width: 100%; background: #fff; border: 1px solid #bbb }
</style>
<h1>Quarterline: ${pictures.length} pictures</h1>
${sections.join("\n")}
</html>
`;
}

/** Pictures in rows of equal cells, each scaled to fit by the mean of the pixels it covers. */
async function contactPng(pictures: readonly Picture[]): Promise<Buffer> {
  const rows = Math.max(1, Math.ceil(pictures.length / COLUMNS));
  const sheet = new PNG({ width: COLUMNS * (CELL.width + GAP) + GAP, height: rows * (CELL.height + GAP) + GAP });
  sheet.data.fill(0xd8);
  for (let at = 3; at < sheet.data.length; at += 4) sheet.data[at] = 255;
  for (const [index, { file }] of pictures.entries()) {
    const small = scaledDown(PNG.sync.read(await readFile(file)), CELL.width, CELL.height);
    const x = GAP + (index % COLUMNS) * (CELL.width + GAP) + Math.floor((CELL.width - small.width) / 2);
    const y = GAP + Math.floor(index / COLUMNS) * (CELL.height + GAP) + Math.floor((CELL.height - small.height) / 2);
    PNG.bitblt(small, sheet, 0, 0, small.width, small.height, x, y);
  }
  return PNG.sync.write(sheet);
}

/** Scaled to fit a box, never up; each new pixel is the mean of those it stands for. */
function scaledDown(picture: PNG, maxWidth: number, maxHeight: number): PNG {
  const scale = Math.min(1, maxWidth / picture.width, maxHeight / picture.height);
  const out = new PNG({ width: Math.max(1, Math.floor(picture.width * scale)), height: Math.max(1, Math.floor(picture.height * scale)) });
  for (let y = 0; y < out.height; y += 1) {
    for (let x = 0; x < out.width; x += 1) out.data.set(meanPixel(picture, x / scale, y / scale, 1 / scale), (y * out.width + x) * 4);
  }
  return out;
}

function meanPixel(picture: PNG, left: number, top: number, side: number): [number, number, number, number] {
  const sum: [number, number, number] = [0, 0, 0];
  let count = 0;
  for (let y = Math.floor(top); y < Math.min(picture.height, Math.max(top + side, Math.floor(top) + 1)); y += 1) {
    for (let x = Math.floor(left); x < Math.min(picture.width, Math.max(left + side, Math.floor(left) + 1)); x += 1) {
      const at = (y * picture.width + x) * 4;
      for (const channel of [0, 1, 2] as const) sum[channel] += picture.data[at + channel]!;
      count += 1;
    }
  }
  return [sum[0] / count, sum[1] / count, sum[2] / count, 255];
}
