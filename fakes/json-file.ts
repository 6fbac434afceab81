/** State of a fake kept in one JSON file, so that demo data outlives a restart. */
import { mkdirSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import { dirname } from "node:path";

export interface JsonFile<State> {
  /** The state as last written, or undefined when there is no file yet. Throws on a damaged file. */
  read(): State | undefined;
  /** Writes beside the file and renames, so that a crash leaves the old or the new state, never half of one. */
  write(state: State): void;
}

/** A file at `path`; without a path nothing is kept. */
export function jsonFile<State>(path: string | undefined): JsonFile<State> {
  if (!path) return { read: () => undefined, write: () => undefined };
  mkdirSync(dirname(path), { recursive: true });
  return {
    read() {
      let text: string;
      try {
        text = readFileSync(path, "utf8");
      } catch (error) {
        if ((error as NodeJS.ErrnoException).code === "ENOENT") return undefined;
        throw error;
      }
      return JSON.parse(text) as State;
    },
    write(state) {
      writeFileSync(`${path}.next`, JSON.stringify(state, null, 1));
      renameSync(`${path}.next`, path);
    },
  };
}
