/** A part held by one tab turns about it. */
export const FEWEST_TABS = 2;

/** Tabs that hold one part: one to every started `spacing` of its outer outline, at least two. Millimetres. */
export const tabCount = (outerLength: number, spacing: number): number =>
  Math.max(FEWEST_TABS, Math.ceil(outerLength / spacing - 1e-9));
