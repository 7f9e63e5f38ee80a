/** Builds the model beside the page, so that typing never waits for it. */
import { modelOf, type ModelRequest } from "./draw-line";

self.onmessage = ({ data }: MessageEvent<ModelRequest>) => self.postMessage(modelOf(data));
