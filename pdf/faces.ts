/** The faces on paper, read and parsed once per process: parsing costs more than painting a sheet. */
import { readFileSync } from "node:fs";
import path from "node:path";
import * as fontkit from "fontkit";
import { FACES, type FaceName } from "@/fonts/families";

const parsed = new Map<FaceName, fontkit.Font>();

/** The face's file. Throws when it is missing from fonts/. */
export function faceBytes(face: FaceName): Buffer {
  return readFileSync(path.join(process.cwd(), "fonts", FACES[face].file));
}

/** The parsed face. Throws when its file is missing from fonts/: a broken installation. */
export function faceFont(face: FaceName): fontkit.Font {
  const known = parsed.get(face);
  if (known) return known;
  const font = fontkit.create(faceBytes(face));
  if (!("glyphForCodePoint" in font)) throw new Error(`${FACES[face].file} is not a single face`);
  parsed.set(face, font);
  return font;
}
