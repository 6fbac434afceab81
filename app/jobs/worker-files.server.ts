export type WorkerName = "read-drawing" | "find-parts";

/**
 * URL of a worker's module. Vite (build, development, tests) bundles or finds it by the node-worker plugin; a command
 * run by tsx knows nothing of Vite and takes the source file that lies beside this one.
 */
export async function workerFile(name: WorkerName): Promise<string> {
  if (import.meta.env === undefined) return new URL(`${name}.worker.ts`, import.meta.url).href;
  const { bundledWorkers } = await import("./bundled-workers.server");
  return bundledWorkers[name];
}
