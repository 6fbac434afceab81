import type { Path } from "../geometry";
import type { SetAside } from "./part";

/** What is set aside, counted by reason and layer. */
export class AsideList {
  private readonly entries = new Map<string, SetAside & { count: number; readonly paths: Path[] }>();

  add(what: SetAside["what"], { layer, path }: { readonly layer: string; readonly path: Path }): void {
    const entry = this.entry(what, layer);
    entry.count++;
    entry.paths.push(path);
  }

  /** One thing more without a path: a text. */
  count(what: SetAside["what"], layer: string): void {
    this.entry(what, layer).count++;
  }

  list(): SetAside[] {
    return [...this.entries.values()];
  }

  private entry(what: SetAside["what"], layer: string) {
    const key = `${what} ${layer}`;
    const held = this.entries.get(key) ?? { what, layer, count: 0, paths: [] };
    this.entries.set(key, held);
    return held;
  }
}
