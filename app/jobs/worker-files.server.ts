export type ModuleName = "task-host" | "read-drawing.worker" | "find-parts.worker";

/**
 * URL of a module that runs outside this process's main thread. Vite (build, development, tests) bundles or finds it
 * by the node-worker plugin; a command run by tsx knows nothing of Vite and takes the source file that lies beside
 * this one.
 */
export async function moduleFile(name: ModuleName): Promise<string> {
  if (import.meta.env === undefined) return new URL(`${name}.ts`, import.meta.url).href;
  const { bundledWorkers } = await import("./bundled-workers.server");
  return bundledWorkers[name];
}
