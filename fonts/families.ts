/** The faces on paper and where their files lie. The browser uses web fonts of the same families. */

export type FaceName = "regular" | "bold" | "mono";

/** File beside this one that holds each face, and the family and weight a browser knows it by. */
export const FACES: Readonly<Record<FaceName, { readonly file: string; readonly family: string; readonly weight: 400 | 700 }>> = {
  regular: { file: "roboto-regular.ttf", family: "Roboto", weight: 400 },
  bold: { file: "roboto-bold.ttf", family: "Roboto", weight: 700 },
  mono: { file: "roboto-mono-regular.ttf", family: "Roboto Mono", weight: 400 },
};

export const FACE_NAMES: readonly FaceName[] = ["regular", "bold", "mono"];
