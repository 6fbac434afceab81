import type { LengthUnit } from "~/domain/units";
import { benchLid, chartTableDrawers, fanPanel, galleyCarcass, lockerDoors } from "./houseboat";
import { drawerFronts, menuFrame, servingTray, trialBox } from "./kiosk";
import { bunkSide, lampShelf, libraryShelves, lightPanels } from "./trailer";

/** A drawing of the demonstration: drawn by our own code, so that the shop opens with real files. */
export interface DemoDrawing {
  readonly fileName: string;
  /** What the coordinates are in, whatever the file says. */
  readonly unit: Extract<LengthUnit, "mm" | "in">;
  /** Code of the material it is drawn for. */
  readonly material: string;
  /** DXF text; the same at every call. */
  readonly draw: () => string;
}

export const DEMO_DRAWINGS = {
  "galley-carcass": {
    fileName: "galley-carcass-port.dxf",
    unit: "mm",
    material: "BB-18",
    draw: galleyCarcass,
  },
  "locker-doors": { fileName: "locker-doors.dxf", unit: "mm", material: "BB-18", draw: lockerDoors },
  "fan-panel": { fileName: "roof-fan-panel.dxf", unit: "mm", material: "BB-9", draw: fanPanel },
  "chart-table-drawers": {
    fileName: "chart-table-drawers.dxf",
    unit: "mm",
    material: "BB-9",
    draw: chartTableDrawers,
  },
  "bench-lid": { fileName: "bench-lid-old.dxf", unit: "mm", material: "BB-18", draw: benchLid },
  "library-shelves": {
    fileName: "library-shelf-run.dxf",
    unit: "mm",
    material: "BB-18",
    draw: libraryShelves,
  },
  "light-panels": { fileName: "light-locker-panels.dxf", unit: "mm", material: "BB-18", draw: lightPanels },
  "bunk-side": { fileName: "bunk-side-inches.dxf", unit: "in", material: "MDF-18", draw: bunkSide },
  "lamp-shelf": { fileName: "lamp-shelf.dxf", unit: "mm", material: "BB-12", draw: lampShelf },
  "menu-frame": { fileName: "kiosk-menu-frame.dxf", unit: "mm", material: "BB-9", draw: menuFrame },
  "drawer-fronts": {
    fileName: "counter-drawer-fronts.dxf",
    unit: "mm",
    material: "BB-18",
    draw: drawerFronts,
  },
  "serving-tray": { fileName: "serving-trays.dxf", unit: "mm", material: "BB-9", draw: servingTray },
  "trial-box": { fileName: "trial-box.dxf", unit: "mm", material: "POP-12", draw: trialBox },
} as const satisfies Record<string, DemoDrawing>;

export type DemoDrawingName = keyof typeof DEMO_DRAWINGS;
