/**
 * The making itself, without database or store: stored sheets in, a part out; parts in, the package out. Runs in threads of
 * its own, so that pages are answered meanwhile and several processors share the work.
 */
import { strToU8, zipSync, type Zippable } from "fflate";
import { measureText } from "@/fonts/widths";
import { SHEET_PART_WORDS, sheetSetPages, type SheetInput, type SheetSetExtras } from "@/iso";
import { copyWord } from "@/lib/rules/copy-words";
import { plainName } from "@/lib/rules/exchange/file-names";
import { PACKAGE_EXTRAS, type PackageSource, type PackedSheet } from "@/lib/rules/packages";
import { makePart, storedPages, type PartSheet } from "@/pdf/join-part";
import { joinParts } from "@/pdf/join-parts";
import type { Bookmark } from "@/pdf/join-outline";
import { markCopy, type CopyMark } from "@/pdf/mark-copy";
import { paintSheet } from "@/pdf/paint-sheet";
import { frontPages, type PageCounts } from "./package-front";

/** A sheet with what its pages are made from. */
export interface SheetWork {
  readonly ordinal: number;
  readonly packed: PackedSheet;
  readonly stored: Uint8Array;
  /** Frozen input as text, and what the shop knows beside it; null when only the spool sheet is wanted. */
  readonly set: { readonly input: string; readonly extras: SheetSetExtras; readonly logo: Uint8Array | null } | null;
}

export interface PartTask {
  readonly kind: "part";
  readonly packageId: string;
  /** Without the list of sheets, which is long: the part's own come with their bytes. */
  readonly source: Omit<PackageSource, "sheets">;
  readonly sheets: readonly SheetWork[];
}
export interface JoinTask {
  readonly kind: "join";
  readonly packageId: string;
  readonly source: PackageSource;
  readonly parts: readonly Uint8Array[];
}
/** The front of a zip, whose files need no joining. */
export interface FrontTask {
  readonly kind: "front";
  readonly packageId: string;
  readonly source: PackageSource;
}
export type PackageTask = PartTask | JoinTask | FrontTask;

export interface PackageWork {
  readonly bytes: Uint8Array;
  readonly pages: number;
}

/** Equal tasks give equal bytes. @throws when stored bytes are no PDF. */
export function workPackage(task: PackageTask): Promise<PackageWork> {
  if (task.kind === "part") return task.source.form === "pdf" ? pdfPart(task) : zipPart(task);
  return task.kind === "join" ? joined(task) : zipFront(task);
}

/** Numbers of a sheet's parts among a package's pages: the spool sheet first, then each extra in its place. */
const PLACES = PACKAGE_EXTRAS.length + 1;
const FRONT = -1;

async function pdfPart({ packageId, source, sheets }: PartTask): Promise<PackageWork> {
  const parts: PartSheet[] = [];
  for (const work of sheets) {
    const { packed } = work;
    const [mark, name] = [markOf(source, packed), `${packed.sheetNumber} rev ${packed.code},`];
    const first = work.ordinal * PLACES;
    parts.push({ bytes: work.stored, mark, name, sheet: first });
    const set = await setPages(source, work);
    if (set !== null) parts.push({ bytes: set.bytes, mark, name, sheet: set.places.map((place) => first + place) });
  }
  return makePart(parts, packageId);
}

/** Pages made for the package from the sheet's frozen input, and which extra each belongs to. */
async function setPages({ extras, paper }: PartTask["source"], { stored, set, packed }: SheetWork): Promise<{ bytes: Uint8Array; places: number[] } | null> {
  if (set === null || extras.length === 0) return null;
  const frozen = JSON.parse(set.input) as SheetInput;
  const storedSheetPages = await storedPages(stored);
  const input = paper === null ? frozen : { ...frozen, size: paper };
  const { pages, bookmarks } = sheetSetPages(input, ["sheet", ...extras], { ...set.extras, storedSheetPages }, measureText);
  if (pages.length === 0) return null;
  const places = bookmarks.flatMap(({ part, pages: count }) => (part === "sheet" ? [] : Array<number>(count).fill(1 + PACKAGE_EXTRAS.findIndex((extra) => extra === part))));
  const title = `${packed.sheetNumber} revision ${packed.code}, ${packed.line} spool ${packed.letter}`;
  return { bytes: await paintSheet({ pages, issuedAt: input.revision.issuedAt, title, logo: set.logo }), places };
}

function markOf({ printedAt, printedBy }: PartTask["source"], { state, hold, sha256, signed }: PackedSheet): CopyMark {
  return { word: copyWord(state, hold), printedAt, printedBy, original: { sha256, signed } };
}

async function joined({ packageId, source, parts }: JoinTask): Promise<PackageWork> {
  return joinParts({
    title: `${source.jobNumber} ${source.title}`, author: source.shopName, subject: `Spool sheets of job ${source.jobNumber}, uncontrolled copies`,
    keywords: packageId, at: source.printedAt, parts, bookmarks: bookmarksOf(source),
    front: async (pages) => {
      const counts: PageCounts = source.sheets.map((_, ordinal) => Array.from({ length: PLACES }, (__, place) => pages.get(ordinal * PLACES + place) ?? 0));
      return (await makePart([{ bytes: await paintFront(source, counts), mark: null, name: "", sheet: FRONT }], packageId)).bytes;
    },
  });
}

function paintFront(source: PackageSource, counts: PageCounts): Promise<Uint8Array> {
  return paintSheet({ pages: frontPages(source, counts), issuedAt: source.printedAt, title: source.title, subject: "Sheet index", logo: null, author: source.shopName });
}

/** A bookmark of a part that a sheet has no pages of is left out where they are written. */
function bookmarksOf(source: PackageSource): Bookmark[] {
  const lines = new Map<string, Bookmark[]>();
  for (const [ordinal, { line, letter, sheetNumber, code }] of source.sheets.entries()) {
    const extras = PACKAGE_EXTRAS.map((part, index) => ({ title: SHEET_PART_WORDS[part], sheet: ordinal * PLACES + index + 1, within: [] }));
    lines.set(line, [...(lines.get(line) ?? []), { title: `Spool ${letter}, sheet ${sheetNumber} rev ${code}`, sheet: ordinal * PLACES, within: extras }]);
  }
  const front = { title: source.transmittal === null ? "Cover and index" : "Transmittal and index", sheet: FRONT, within: [] };
  return [front, ...[...lines].map(([line, within]) => ({ title: `Line ${line}`, sheet: within[0]!.sheet, within }))];
}

/** Files within a zip are stored as they are: PDFs are packed already. */
const STORED = { level: 0, mtime: new Date("2000-01-01T00:00:00") } as const;

/** Tells a part's zip from every other package's. */
export const PART_WORD = "package";

async function zipPart({ packageId, source, sheets }: PartTask): Promise<PackageWork> {
  const files: Zippable = { [PART_WORD]: [strToU8(packageId), STORED] };
  for (const work of sheets) {
    const { packed } = work;
    const name = zipName(packed);
    files[`${name}.pdf`] = [source.copies === "originals" ? work.stored : await markCopy(work.stored, markOf(source, packed)), STORED];
    const set = await setPages(source, work);
    if (set !== null) files[`${name}-set.pdf`] = [await markCopy(set.bytes, markOf(source, packed)), STORED];
  }
  return { bytes: zipSync(files), pages: 0 };
}

/** "sheets/0007-rev-B-4-CWS-1101-spool-A". */
export function zipName({ sheetNumber, code, line, letter, kind }: PackedSheet): string {
  return `sheets/${plainName(`${sheetNumber}-rev-${code}-${line}-spool-${letter}${kind === "review" ? "-for-review" : ""}`)}`;
}

/** The index of a zip; its sheets are files, so that no pages are counted. */
async function zipFront({ source }: FrontTask): Promise<PackageWork> {
  return { bytes: await paintFront(source, source.sheets.map(() => [])), pages: 0 };
}
