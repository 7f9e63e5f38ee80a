/** Draws beside the page, so that typing never waits for the placing of labels. */
import { drawLine, type DrawAnswer, type DrawRequest } from "./draw-line";

self.onmessage = (event: MessageEvent<DrawRequest>) => {
  const { id, model, room, view } = event.data;
  const answer: DrawAnswer = { id, drawing: drawLine(model, room, view) };
  self.postMessage(answer);
};
