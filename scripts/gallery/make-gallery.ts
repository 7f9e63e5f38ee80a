/** The work of `npm run gallery`: the sixty golden runs, sheets, on request screens, then the contact sheet. Run through scripts/gallery.mjs. */
import { mkdir } from "node:fs/promises";
import path from "node:path";
import { parseArgs } from "node:util";
import { writeContactSheet } from "./contact-sheet";
import { writeGolden } from "./write-golden";
import { writeSheets } from "./write-sheets";
import { takeScreens } from "./take-screens";

const say = (text: string): void => console.log(`  ${text}`);

async function makeGallery(): Promise<void> {
  const { values, positionals } = parseArgs({
    allowPositionals: true,
    options: { folder: { type: "string" }, screens: { type: "string" }, chromium: { type: "string" } },
  });
  const folder = path.resolve(values.folder ?? "gallery");
  await mkdir(folder, { recursive: true });
  const pictures = await writeGolden(path.join(folder, "golden"), positionals, say);
  pictures.push(...(await writeSheets(path.join(folder, "sheets"), positionals, say)));
  if (values.screens) pictures.push(...(await takeScreens(path.join(folder, "screens"), values.screens, values.chromium ?? "", say)));
  say("contact sheet");
  await writeContactSheet(folder, pictures);
  console.log(`\n${pictures.length} pictures. Look at ${path.join(folder, "index.html")} or contact-sheet.png beside it.`);
}

makeGallery().catch((error: unknown) => {
  console.error(`\n${error instanceof Error ? error.message : String(error)}`);
  process.exitCode = 1;
});
