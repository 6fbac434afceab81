import { createContext, type ReactNode, useCallback, useContext, useMemo, useState } from "react";
import type { ShownUnit } from "~/domain/units";

interface Shown {
  readonly unit: ShownUnit;
  readonly change: ((unit: ShownUnit) => void) | null;
}

const ShownUnitContext = createContext<Shown>({ unit: "mm", change: null });

interface ShownUnitProviderProps {
  /** The unit its reader has chosen; a change inside holds until this one changes. */
  readonly unit: ShownUnit;
  /** Told of a change, so that it can be kept. */
  readonly onChange?: (unit: ShownUnit) => void;
  readonly children: ReactNode;
}

/** The unit of every measure inside; whoever offers `mm | in` inside changes them all at once. */
export function ShownUnitProvider({ unit, onChange, children }: ShownUnitProviderProps) {
  const [change, setChange] = useState({ from: unit, to: unit });
  const shown = change.from === unit ? change.to : unit;
  const take = useCallback(
    (to: ShownUnit) => {
      setChange({ from: unit, to });
      onChange?.(to);
    },
    [unit, onChange],
  );
  const value = useMemo(() => ({ unit: shown, change: take }), [shown, take]);
  return <ShownUnitContext value={value}>{children}</ShownUnitContext>;
}

export const useShownUnit = (): ShownUnit => useContext(ShownUnitContext).unit;

/** The shown unit and how to change it, for this place alone where no provider is around it. */
export function useShownUnitChoice(): readonly [ShownUnit, (unit: ShownUnit) => void] {
  const around = useContext(ShownUnitContext);
  const [own, setOwn] = useState<ShownUnit>(around.unit);
  return around.change ? [around.unit, around.change] : [own, setOwn];
}
