/** The route handlers, read from the folder itself. */
import { readdirSync } from "node:fs";
import path from "node:path";

const API = path.resolve(import.meta.dirname, "../../app/api");
const METHODS = ["GET", "HEAD", "POST", "PUT", "PATCH", "DELETE", "OPTIONS"];

export interface Route {
  /** "POST /spools/[spoolId]/submit". */
  readonly name: string;
  readonly method: string;
  readonly handler: unknown;
}

/** Every method of every route file. */
export async function everyRoute(): Promise<Route[]> {
  const files = (readdirSync(API, { recursive: true }) as string[]).filter((file) => /(^|\/)route\.tsx?$/.test(file)).sort();
  const routes = await Promise.all(
    files.map(async (file) => {
      const module = (await import(/* @vite-ignore */ path.join(API, file))) as Record<string, unknown>;
      return Object.keys(module)
        .filter((method) => METHODS.includes(method))
        .map((method) => ({ name: `${method} /${path.dirname(file)}`, method, handler: module[method] }));
    }),
  );
  return routes.flat();
}

/** One handler by name. @throws when there is none. */
export async function routeNamed(name: string): Promise<unknown> {
  const route = (await everyRoute()).find((one) => one.name === name);
  if (route === undefined) throw new Error(`There is no ${name}.`);
  return route.handler;
}
