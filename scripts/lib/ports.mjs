/** Free ports on loopback. */
import { createServer } from "node:net";

/** Whether a port of the address can be listened on. @param {number} port @param {string} [host] */
export function isPortFree(port, host = "127.0.0.1") {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once("error", () => resolve(false));
    probe.listen({ port, host, exclusive: true }, () => probe.close(() => resolve(true)));
  });
}

/** A port nobody listens on, chosen by the system. @returns {Promise<number>} */
export function anyFreePort() {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once("error", reject);
    probe.listen({ port: 0, host: "127.0.0.1" }, () => {
      const { port } = probe.address();
      probe.close(() => resolve(port));
    });
  });
}

/**
 * The wanted port when it is free, else the first free one after it, else any.
 * @param {number} wanted @param {string} [host] @returns {Promise<number>}
 */
export async function freePortFrom(wanted, host = "127.0.0.1") {
  for (let port = wanted; port < Math.min(wanted + 50, 65536); port += 1) {
    if (await isPortFree(port, host)) return port;
  }
  return anyFreePort();
}
