/** The order of the title block's fields, as a shop sets it. What a stored order does not name follows its usual predecessor. */

/** Parts of the title block that move as one, in their usual order; own-1 to own-6 are the fields of the shop's own. */
export const TITLE_KEYS = [
  "client", "project", "job", "area", "own-1", "own-2", "own-3", "own-4", "own-5", "own-6", "line", "title", "spool", "size", "schedule", "material", "spec", "units", "scale", "north",
  "as-entered", "faces", "tolerance", "weight", "drawn", "sign-off", "record",
] as const;
export type TitleKey = (typeof TITLE_KEYS)[number];

/** What each part is called where it is put in order. */
export const TITLE_WORDS: Readonly<Record<Exclude<TitleKey, `own-${number}`>, string>> = {
  client: "Client", project: "Project", job: "Job no.", area: "Area", line: "Line", title: "Title of the line, where it has one", spool: "Spool", size: "Size", schedule: "Schedule", material: "Material",
  spec: "Specification, where it has one", units: "Units", scale: "Scale", north: "North", "as-entered": "As entered: insulation, PWHT, NDE, test, paint", faces: "Faces and gaskets", tolerance: "Tolerance",
  weight: "Weight", drawn: "Drawn", "sign-off": "Checked and signed", record: "Record of the log",
};

/** Every key once: those of a stored order as they stand, each other one after the key that usually goes before it. */
export function titleOrder(order: readonly string[] | undefined): readonly TitleKey[] {
  const isKey = (key: string): key is TitleKey => (TITLE_KEYS as readonly string[]).includes(key);
  const keys = [...new Set(order ?? [])].filter(isKey);
  TITLE_KEYS.forEach((key, at) => {
    if (!keys.includes(key)) keys.splice(at === 0 ? 0 : keys.indexOf(TITLE_KEYS[at - 1]!) + 1, 0, key);
  });
  return keys;
}
