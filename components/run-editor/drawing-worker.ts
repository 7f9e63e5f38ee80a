/** Draws beside the page, so that typing never waits for the placing of labels. */
import { drawLine, modelOf, type DrawRequest } from "./draw-line";

self.onmessage = ({ data }: MessageEvent<DrawRequest>) => self.postMessage(drawLine(modelOf(data), data.room, data.view));
