/**
 * What every change of a line's document comes down to: check it, bring its marks and spools up to date, and note who
 * touched it. The caller holds the line's lock.
 */
import { buildModel, nextMarks, parseRunDocument, type MarksRegister, type Model, type RunDocument } from "@/iso";
import { documentRefusal } from "@/lib/rules/document-refusal";
import { takeOutWords } from "@/lib/queries/take-out-words";
import { storedDocument, storedMarks } from "@/lib/queries/stored-line";
import type { CommandContext } from "@/lib/server/command";
import { refuseInvalid } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { LineTouch, type Line } from "@/models";
import { syncSpools } from "./sync-spools";

/** Most spools one line may have; each is a row and a sheet. */
const MAX_SPOOLS = 400;

/** A checked run document. @throws Refusal 400 with what is wrong, in sentences. */
export function checkedDocument(value: unknown): RunDocument {
  const parsed = parseRunDocument(value);
  if (parsed.ok) return parsed.document;
  const sentence = documentRefusal(parsed.messages);
  throw refuseInvalid(sentence, { document: sentence });
}

/** Facts of a document that lists show without reading it. */
export function documentFacts(document: RunDocument): Pick<Line, "number" | "title" | "size" | "material" | "points" | "document"> {
  const { nps, schedule, material } = document.settings.pipe;
  return {
    number: document.number,
    title: document.title,
    size: `NPS ${nps} ${schedule}`,
    material,
    points: document.runs.reduce((sum, run) => sum + run.points.length, 0),
    document: JSON.stringify(document),
  };
}

export interface Computed {
  readonly marks: MarksRegister;
  readonly model: Model;
}

/** Marks and model of a document, from the register so far. @throws Refusal 400 when it falls into too many spools. */
export async function computeLine(context: CommandContext, document: RunDocument, before: MarksRegister): Promise<Computed> {
  const takeOuts = await takeOutWords(context.viewer, context.tx);
  const marks = nextMarks(document, before, takeOuts);
  const model = buildModel(document, marks, takeOuts);
  if (model.spools.length > MAX_SPOOLS) throw refuseInvalid(`This line falls into ${model.spools.length} spools; ${MAX_SPOOLS} at most can be kept.`);
  return { marks, model };
}

/** From the line's first issue on it is drawn from the same side, whatever a save says. */
function withFrozenView(line: Line, document: RunDocument): RunDocument {
  const { view } = storedDocument(line);
  return storedMarks(line).sticky && view !== null ? { ...document, view } : document;
}

/** Writes a new version of a line's document. */
export async function writeDocument(context: CommandContext, line: Line, given: RunDocument): Promise<void> {
  const { viewer, tx, now } = context;
  const document = withFrozenView(line, given);
  const { marks, model } = await computeLine(context, document, storedMarks(line));
  const version = line.version + 1;
  await line.update(
    { ...documentFacts(document), marks: JSON.stringify(marks), version, updatedAt: now, updatedBy: viewer.personId },
    { transaction: tx },
  );
  await syncSpools(context, line.id, model);
  await noteTouch(context, line.id, version);
}

/** Notes that the viewer touched the line's content: they will not sign it. */
export async function noteTouch({ viewer, tx, now }: CommandContext, lineId: string, version: number): Promise<void> {
  await inShop(viewer).add(LineTouch, { lineId, personId: viewer.personId, version, at: now }, tx);
}
