/**
 * One TypeScript entry of ours with all it imports of ours as one ES module, the way the code ships: types gone, names as
 * the bundler leaves them, no loader in between. Packages stay outside and load as Node loads them. What asks where its own
 * file lies (import.meta) is told the source's place, since its neighbours stay there.
 */
import { mkdirSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { ROOT } from "./paths.mjs";

/** Under node_modules, so that the packages are found from there. */
const CACHE = path.join(ROOT, "node_modules/.cache/bundles");
const OURS = /\.(ts|tsx|mts|mjs)$/;
const WHERE_IT_LIES = /\bimport\.meta\.(url|dirname|filename)\b/g;

/** Answers `import.meta` of each source with that source's own place. */
const sourcePlaces = {
  name: "source-places",
  setup(build) {
    build.onLoad({ filter: OURS }, ({ path: file }) => {
      const places = { url: pathToFileURL(file).href, dirname: path.dirname(file), filename: file };
      const contents = readFileSync(file, "utf8").replace(WHERE_IT_LIES, (_, place) => JSON.stringify(places[place]));
      const loader = path.extname(file).slice(1).replace(/^m/, "");
      return { contents, loader, resolveDir: places.dirname };
    });
  },
};

/** Next's parts are imported without the ending that a plain module must write. */
const nextParts = {
  name: "next-parts",
  setup(build) {
    build.onResolve({ filter: /^next\/[a-z]+$/ }, ({ path: name }) => ({ path: `${name}.js`, external: true }));
  },
};

/**
 * Bundles `entry`, hands the module to `work` and removes the bundle when the work is done.
 * @param {string} entry @param {(module: Record<string, any>) => Promise<any>} work
 * @param {{maps?: boolean}} [options] maps: whether errors name the sources' lines; without, the module takes a third of the memory
 * @throws what the bundler has to say of a source it cannot read, and whatever the module or the work throws
 */
export async function withBundle(entry, work, { maps = true } = {}) {
  const { build } = await import("esbuild");
  mkdirSync(CACHE, { recursive: true });
  const folder = mkdtempSync(path.join(CACHE, "bundle-"));
  try {
    const outfile = path.join(folder, "bundle.mjs");
    await build({
      entryPoints: [entry], outfile, bundle: true, format: "esm", platform: "node", target: "node20", packages: "external", absWorkingDir: ROOT,
      sourcemap: maps ? "inline" : false, sourcesContent: false, logLevel: "silent", plugins: [sourcePlaces, nextParts],
    });
    return await work(await import(pathToFileURL(outfile).href));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
