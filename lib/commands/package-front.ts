/** The pages in front of a package: its cover or transmittal, and the index of what is in it. */
import { measureText } from "@/fonts/widths";
import { composeCoverPages, composeIndexPages, SHEET_PART_WORDS, type IndexEntry, type SheetPage } from "@/iso";
import { PACKAGE_EXTRAS, standingWords, type PackageExtra, type PackageSource, type PackedSheet } from "@/lib/rules/packages";

/** Pages of each sheet: those of the spool sheet first, then of the extras in their order. */
export type PageCounts = readonly (readonly number[])[];

/** @param counts pages by sheet; they are counted on from the front's own. */
export function frontPages(source: PackageSource, counts: PageCounts): SheetPage[] {
  const after = counts.flat().reduce((sum, pages) => sum + pages, 0);
  const draft = composed(source, entriesOf(source, counts, 0), 0, 0);
  const front = draft.length;
  return composed(source, entriesOf(source, counts, front), front, front + after);
}

function composed(source: PackageSource, entries: readonly IndexEntry[], front: number, of: number): SheetPage[] {
  const { shopName, client, jobTitle, jobNumber, area, title, frontPaper, printedAt, printedBy, address, transmittal } = source;
  const base = {
    titleBlock: { shopName, client, project: jobTitle, jobNumber, area }, size: frontPaper, title, madeAt: printedAt, madeBy: printedBy, statusUrl: address,
    number: transmittal === null ? `JOB ${jobNumber}` : transmittal.number,
  };
  const place = (first: number) => (front === 0 ? undefined : { first, of });
  const word = transmittal === null ? "PACKAGE" : "TRANSMITTAL";
  const cover = composeCoverPages({ ...base, word, facts: factsOf(source), notes: notesOf(source), acknowledge: transmittal !== null, place: place(1) }, measureText);
  return [...cover, ...composeIndexPages({ ...base, entries, place: place(cover.length + 1) }, measureText)];
}

function entriesOf({ sheets, extras }: PackageSource, counts: PageCounts, front: number): IndexEntry[] {
  let firstPage = front + 1;
  const extra = extras.length === 0 ? "" : `, with ${PACKAGE_EXTRAS.filter((part) => extras.includes(part)).map(partWord).join(", ")}`;
  return sheets.map(({ sheetNumber, code, state, hold, line, letter }, ordinal) => {
    const pages = (counts[ordinal] ?? []).reduce((sum, one) => sum + one, 0);
    const entry = { sheetNumber, code, state, hold, title: `Line ${line} spool ${letter}${extra}`, pages, firstPage: pages === 0 ? 0 : firstPage };
    firstPage += pages;
    return entry;
  });
}

function factsOf({ transmittal, title, jobNumber, jobTitle, client, printedAt, printedBy, sheets }: PackageSource) {
  const fact = (label: string, value: string) => ({ label, value: value || "-" });
  const contents = `${sheets.length} ${sheets.length === 1 ? "sheet" : "sheets"}: ${countsOf(sheets)}`;
  const made = [fact("WHAT", title), fact("JOB", `${jobNumber} ${jobTitle}`), fact("CLIENT", client), fact("CONTENTS", contents), fact("MADE", `${timeWords(printedAt)} by ${printedBy}`)];
  if (transmittal === null) return made;
  const { number, date, purpose, recipient, replyBy, remark } = transmittal;
  const asked = [fact("NUMBER", number), fact("DATE", date), fact("TO", recipient), fact("PURPOSE", purpose), fact("REPLY BY", replyBy || "no reply asked for")];
  return [...asked, ...made, ...(remark === "" ? [] : [fact("REMARK", remark)])];
}

/** "templates": a part's first words, for the middle of a sentence. */
function partWord(part: PackageExtra): string {
  return SHEET_PART_WORDS[part].replace(/,.*/, "").toLowerCase();
}

/** "12 FOR FABRICATION, 1 FOR FABRICATION, HOLD". */
function countsOf(sheets: readonly PackedSheet[]): string {
  const counts = new Map<string, number>();
  for (const sheet of sheets) counts.set(standingWords(sheet), (counts.get(standingWords(sheet)) ?? 0) + 1);
  return [...counts].map(([words, count]) => `${count} ${words}`).join("; ");
}

function timeWords(iso: string): string {
  return `${iso.slice(0, 10)} ${iso.slice(11, 16)} UTC`;
}

function notesOf({ form, copies, sheets, extras }: PackageSource): string[] {
  const signed = sheets.some((sheet) => sheet.signed);
  const originals = form === "zip" && copies === "originals";
  return [
    originals
      ? "The sheets are the stored files, unaltered. A signature in one covers that file's bytes: check it in the file itself. SHA256SUMS names the hash of each."
      : "Each spool sheet here is an uncontrolled copy of a stored sheet, marked with who printed it when. Its lines and text are the stored ones; nothing was drawn anew.",
    ...(signed && !originals
      ? ["Signatures: the shop's signature covers the bytes of each sheet's own file and cannot hold for a copy, so that none is shown here. Each page names the SHA-256 of its signed original; the sheet's status page, by the QR code, says where it stands and recognizes the original."]
      : []),
    ...(extras.length > 0 ? [`Made for this print from each sheet's own frozen input: ${extras.map(partWord).join(", ")}. They are not part of the signed file.`] : []),
    "States are those at the time of printing. A sheet may be superseded, held or void since: compare its revision with its status page before work.",
  ];
}
