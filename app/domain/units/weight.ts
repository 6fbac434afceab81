/** The international avoirdupois pound, exactly 0.45359237 kg since 1959. */
export const KG_PER_LB = 0.45359237;
export const kilogramsToPounds = (kg: number): number => kg / KG_PER_LB;
export const poundsToKilograms = (lb: number): number => lb * KG_PER_LB;

/** `12.6 kg · 27.8 lb` */
export const formatKilograms = (kg: number): string =>
  `${kg.toFixed(1)} kg · ${kilogramsToPounds(kg).toFixed(1)} lb`;

/** Kilograms of a flat panel: area in mm2, thickness in mm, density in kg/m3. */
export const panelKilograms = (area: number, thickness: number, density: number): number =>
  (area * thickness * density) / 1e9;
