/**
 * Surveys and photos kept in this browser's own database until the server has them: written at every change, so that
 * neither a closed tab nor a dead battery loses a reading.
 */
import { openDB, type DBSchema, type IDBPDatabase } from "idb";
import { parseSurveyDocument, type SurveyDocument } from "@/iso";
import type { SurveyDetail } from "@/lib/rules/survey-api-types";

export interface KeptSurvey {
  readonly lineId: string;
  readonly personId: string;
  /** As the page holds it. */
  readonly document: SurveyDocument;
  /** As the server was last known to hold it; the two differ while something is unsent. */
  readonly base: SurveyDocument;
  readonly version: number;
  /** What the page needs beside the document, to open without a signal. */
  readonly detail: SurveyDetail;
  readonly at: string;
}

export interface KeptPhoto {
  readonly id: string;
  readonly lineId: string;
  readonly personId: string;
  readonly name: string;
  readonly type: string;
  readonly bytes: ArrayBuffer;
  readonly at: string;
}

interface Kept extends DBSchema {
  surveys: { key: [string, string]; value: KeptSurvey; indexes: { line: string } };
  photos: { key: string; value: KeptPhoto; indexes: { line: string } };
}

export interface SurveyStore {
  /** This person's copy, or with null the newest of anybody on this device (without a signal nobody can be asked for). */
  read(lineId: string, personId: string | null): Promise<KeptSurvey | null>;
  write(kept: KeptSurvey): Promise<void>;
  photos(lineId: string): Promise<KeptPhoto[]>;
  addPhoto(photo: KeptPhoto): Promise<void>;
  removePhoto(id: string): Promise<void>;
}

const NAME = "quarterline-survey";

/** Opens the browser's database. @throws when the browser keeps none (private windows of some). */
export async function openSurveyStore(): Promise<SurveyStore> {
  const db = await openDB<Kept>(NAME, 1, {
    upgrade(fresh) {
      fresh.createObjectStore("surveys", { keyPath: ["lineId", "personId"] }).createIndex("line", "lineId");
      fresh.createObjectStore("photos", { keyPath: "id" }).createIndex("line", "lineId");
    },
  });
  return storeOf(db);
}

function storeOf(db: IDBPDatabase<Kept>): SurveyStore {
  return {
    read: async (lineId, personId) => {
      const rows = personId === null ? await db.getAllFromIndex("surveys", "line", lineId) : [await db.get("surveys", [lineId, personId])];
      const newest = rows.filter((row) => row !== undefined).sort((a, b) => b.at.localeCompare(a.at))[0];
      const [document, base] = [parseSurveyDocument(newest?.document), parseSurveyDocument(newest?.base)];
      return newest && document && base ? { ...newest, document, base } : null;
    },
    // "strict": the browser answers when the write is on the disk, not when it is in memory.
    write: async (kept) => {
      const tx = db.transaction("surveys", "readwrite", { durability: "strict" });
      await Promise.all([tx.store.put(kept), tx.done]);
    },
    photos: (lineId) => db.getAllFromIndex("photos", "line", lineId),
    addPhoto: async (photo) => void (await db.put("photos", photo)),
    removePhoto: (id) => db.delete("photos", id),
  };
}
