/** Light or dark: what the person chose on this device, else what the device says. */

const key = "coldface-scheme";

type Scheme = "light" | "dark" | "system";

/** Sets the scheme before the first paint; the page's own code is not there yet. */
export const firstPaintScript = `(function(){var s=null;try{s=localStorage.getItem("${key}")}catch(e){}document.documentElement.classList.toggle("dark",s?s==="dark":matchMedia("(prefers-color-scheme: dark)").matches)})()`;

function chosen(): string | null {
  try {
    return localStorage.getItem(key);
  } catch {
    // Storage may be forbidden; the device then decides.
    return null;
  }
}

export function applyScheme(): void {
  const choice = chosen();
  const dark = choice ? choice === "dark" : matchMedia("(prefers-color-scheme: dark)").matches;
  document.documentElement.classList.toggle("dark", dark);
}

export function chooseScheme(scheme: Scheme): void {
  if (scheme === "system") localStorage.removeItem(key);
  else localStorage.setItem(key, scheme);
  applyScheme();
}
