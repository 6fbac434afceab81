import { createContext, type ReactNode, useContext } from "react";
import type { ShownUnit } from "~/domain/units";

const ShownUnitContext = createContext<ShownUnit>("mm");

interface ShownUnitProviderProps {
  readonly unit: ShownUnit;
  readonly children: ReactNode;
}

/** The unit its reader has chosen, for every measure inside. */
export function ShownUnitProvider({ unit, children }: ShownUnitProviderProps) {
  return <ShownUnitContext value={unit}>{children}</ShownUnitContext>;
}

export const useShownUnit = (): ShownUnit => useContext(ShownUnitContext);
