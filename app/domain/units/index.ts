/**
 * Lengths, money and time, each conversion once.
 *
 * Lengths are stored in millimetres, money in integer cents, durations in minutes. The brands keep one from
 * being passed for another; `mm()`, `cents()` and `minutes()` are the only ways in.
 */

export {
  formatArea,
  formatInches,
  formatLength,
  formatMillimetres,
  INCH_IN_MM,
  inMillimetres,
  LENGTH_UNITS,
  type LengthUnit,
  type Millimetres,
  MM_PER_UNIT,
  mm,
  nearest64th,
  type ShownUnit,
} from "./length";
export { type Cents, cents, formatMoney, roundHalfUp } from "./money";
export { formatMinutes, type Minutes, minutes } from "./time";
export { formatKilograms, KG_PER_LB, kilogramsToPounds, panelKilograms, poundsToKilograms } from "./weight";
