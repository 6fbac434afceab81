import path from "node:path";
import type { Plugin } from "vite";

const SUFFIX = "?node-worker";
const placeholder = (file: string) => `__KERFPOST_NODE_WORKER__${file}__`;
const PLACEHOLDERS = /"__KERFPOST_NODE_WORKER__(.+?)__"/g;

/**
 * `import url from "./read.worker.ts?node-worker"` gives the URL of a module to run in a worker thread: the source
 * file itself in development and tests (run through tsx), a chunk of its own in the build.
 */
export function nodeWorker(): Plugin {
  let building = false;
  return {
    name: "kerfpost-node-worker",
    enforce: "pre",
    configResolved(config) {
      building = config.command === "build";
    },
    async resolveId(source, importer) {
      if (!source.endsWith(SUFFIX)) return null;
      const resolved = await this.resolve(source.slice(0, -SUFFIX.length), importer, { skipSelf: true });
      return resolved ? `${resolved.id}${SUFFIX}` : null;
    },
    load(id) {
      if (!id.endsWith(SUFFIX)) return null;
      const file = id.slice(0, -SUFFIX.length);
      if (!building) return `export default ${JSON.stringify(`file://${file}`)};`;
      const fileName = `workers/${path.basename(file).replace(/\.ts$/, ".js")}`;
      this.emitFile({ type: "chunk", id: file, fileName, preserveSignature: "strict" });
      return `export default ${JSON.stringify(placeholder(fileName))};`;
    },
    renderChunk(code, chunk) {
      if (!code.includes("__KERFPOST_NODE_WORKER__")) return null;
      return code.replace(PLACEHOLDERS, (_, file: string) => {
        const relative = path.posix.relative(path.posix.dirname(chunk.fileName), file);
        return `new URL(${JSON.stringify(relative.startsWith(".") ? relative : `./${relative}`)}, import.meta.url).href`;
      });
    },
  };
}
