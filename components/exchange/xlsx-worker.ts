/** Reads a workbook beside the page, which stays alive and can give up on it. */
import { readWorkbook } from "./xlsx-read";

self.onmessage = async (event: MessageEvent<Uint8Array>) => {
  self.postMessage(await readWorkbook(event.data));
};
