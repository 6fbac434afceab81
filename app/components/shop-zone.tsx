import { createContext, type ReactNode, useContext } from "react";

const ShopZoneContext = createContext("UTC");

interface ShopZoneProviderProps {
  /** IANA name: "America/New_York". */
  readonly zone: string;
  readonly children: ReactNode;
}

/** The shop's time zone, in which every date and time inside is shown. */
export function ShopZoneProvider({ zone, children }: ShopZoneProviderProps) {
  return <ShopZoneContext value={zone}>{children}</ShopZoneContext>;
}

export const useShopZone = (): string => useContext(ShopZoneContext);
