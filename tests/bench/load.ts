/** Many keep-alive connections to one address on loopback, each asking again as soon as it is answered. */
import { Agent, get } from "node:http";

const REQUEST_LIMIT_MS = 10_000;
/** No run asks more often, whatever its time. */
const MOST_REQUESTS = 20_000;

export interface Load {
  readonly perSecond: number;
  readonly answers: number;
  /** Answers other than 200, and requests that were not answered. */
  readonly errors: number;
}

export interface Target {
  readonly url: string;
  readonly cookie: string;
}

/** One answer's status and text; status 0 when there was none. */
export function ask({ url, cookie }: Target, agent?: Agent): Promise<{ status: number; text: string }> {
  return new Promise((resolve) => {
    const failed = () => resolve({ status: 0, text: "" });
    const request = get(url, { agent, headers: { cookie }, timeout: REQUEST_LIMIT_MS }, (response) => {
      const chunks: Buffer[] = [];
      response.on("data", (chunk: Buffer) => chunks.push(chunk));
      response.on("end", () => resolve({ status: response.statusCode ?? 0, text: Buffer.concat(chunks).toString() }));
      response.on("error", failed);
    });
    request.on("timeout", () => request.destroy());
    request.on("error", failed);
  });
}

/** Asks over so many connections for so long. */
export async function load(target: Target, connections: number, forMs: number): Promise<Load> {
  const agent = new Agent({ keepAlive: true, maxSockets: connections });
  let [answers, errors] = [0, 0];
  const from = performance.now();
  const one = async (): Promise<void> => {
    while (performance.now() - from < forMs && answers + errors < MOST_REQUESTS) {
      const { status } = await ask(target, agent);
      if (status === 200) answers += 1;
      else errors += 1;
    }
  };
  await Promise.all(Array.from({ length: connections }, one));
  const perSecond = (answers * 1000) / (performance.now() - from);
  agent.destroy();
  return { perSecond, answers, errors };
}
