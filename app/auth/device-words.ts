const BROWSERS: readonly (readonly [RegExp, string])[] = [
  [/Edg\//, "Edge"],
  [/Firefox\//, "Firefox"],
  [/OPR\//, "Opera"],
  [/Chrome\//, "Chrome"],
  [/Safari\//, "Safari"],
];
const SYSTEMS: readonly (readonly [RegExp, string])[] = [
  [/iPhone|iPad/, "iOS"],
  [/Android/, "Android"],
  [/Windows/, "Windows"],
  [/Mac OS X/, "macOS"],
  [/Linux/, "Linux"],
];

/** `Firefox on Linux`, from what a browser says of itself. Only for a person to recognise their own. */
export function deviceWords(userAgent: string | null | undefined): string {
  const named = (names: typeof BROWSERS) => names.find(([pattern]) => pattern.test(userAgent ?? ""))?.[1];
  const browser = named(BROWSERS) ?? "A browser";
  const system = named(SYSTEMS);
  return system ? `${browser} on ${system}` : browser;
}
