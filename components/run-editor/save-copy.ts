/** A document of this editor kept as a line of its own: the line is copied, then the document written into the copy. */
import type { RunDocument } from "@/iso";
import { apiGet, apiSend } from "@/components/ui/fetcher";
import type { LineDetail } from "@/lib/rules/api-types";

/** Longest number a line may have. */
const NUMBER_LIMIT = 60;

export interface SavedCopy {
  readonly id: string;
  readonly number: string;
}

/** @throws ApiFailure when the number is taken or there is no connection. */
export async function saveCopy(lineId: string, document: RunDocument, wanted: string): Promise<SavedCopy> {
  const number = wanted.slice(0, NUMBER_LIMIT);
  const { id } = await apiSend<{ id: string }>("POST", `/api/lines/${lineId}/copy`, { number, title: document.title });
  const made = await apiGet<LineDetail>(`/api/lines/${id}`);
  await apiSend("PUT", `/api/lines/${id}`, { version: made.version, document: { ...document, number: made.document.number } });
  return { id, number };
}
