import type { DxfLayer } from "./sections";

/** Layers by name, whatever the case; a layer that is used but not declared is shown. */
export class LayerTable {
  readonly #byKey = new Map<string, DxfLayer>();

  constructor(layers: readonly DxfLayer[]) {
    for (const layer of layers) this.#byKey.set(layer.name.toLowerCase(), layer);
  }

  /** The layer's name as first written. */
  nameOf(name: string): string {
    const key = name.toLowerCase();
    const known = this.#byKey.get(key);
    if (known) return known.name;
    this.#byKey.set(key, { name, off: false, frozen: false });
    return name;
  }

  isFrozen(name: string): boolean {
    return this.#byKey.get(name.toLowerCase())?.frozen ?? false;
  }

  isHidden(name: string): boolean {
    const layer = this.#byKey.get(name.toLowerCase());
    return layer !== undefined && (layer.off || layer.frozen);
  }

  all(): DxfLayer[] {
    return [...this.#byKey.values()];
  }
}
