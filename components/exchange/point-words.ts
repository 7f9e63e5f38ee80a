/** The editor's readers and writers of cells, as files use them: a file and the grid speak the same words. */
import { itemText } from "@/components/run-editor/item-text";
import { parseItem } from "@/components/run-editor/item-entry";
import { parseMove } from "@/components/run-editor/move-entry";
import { straightOnOf } from "@/components/run-editor/move-text";
import { parsePlaces, placesText } from "@/components/run-editor/place-entry";
import { parseProvenance } from "@/components/run-editor/provenance-entry";
import type { PointReaders } from "@/lib/rules/exchange/read-points";
import type { PointWriters } from "@/lib/rules/exchange/write-points";

export const POINT_READERS: PointReaders = { move: parseMove, item: parseItem, joint: parsePlaces, source: parseProvenance, straightOn: straightOnOf };

export const POINT_WRITERS: PointWriters = { item: itemText, joint: placesText };
