const YEAR_IN_SECONDS = 31_536_000;

function keepChoice(theme: string, seconds: number) {
  // biome-ignore lint/suspicious/noDocumentCookie: the Cookie Store API is not in every browser yet
  document.cookie = `theme=${theme}; path=/; max-age=${seconds}; samesite=lax`;
}

/** Takes the other of light and dark. A choice equal to the device's own is forgotten, so that it follows again. */
function switchTheme() {
  const device = matchMedia("(prefers-color-scheme: dark)").matches ? "dark" : "light";
  const chosen = (document.documentElement.dataset.theme ?? device) === "dark" ? "light" : "dark";
  if (chosen === device) {
    delete document.documentElement.dataset.theme;
    keepChoice("", 0);
  } else {
    document.documentElement.dataset.theme = chosen;
    keepChoice(chosen, YEAR_IN_SECONDS);
  }
}

/** One word that changes the colours to the other kind, kept in a cookie that the first page of a visit reads. */
export function ThemeSwitch() {
  return (
    <button type="button" onClick={switchTheme} className="text-soft hover:text-ink pointer-coarse:min-h-11">
      <span className="dark:hidden">
        dark<span className="sr-only"> colours</span>
      </span>
      <span className="hidden dark:inline">
        light<span className="sr-only"> colours</span>
      </span>
    </button>
  );
}
