import localFont from "next/font/local";

/* Fonts ship with the application; each file is one script's subset. Neither text face has Greek, so one with it stands behind both. */

export const archivo = localFont({
  src: [
    {
      path: "../node_modules/@fontsource-variable/archivo/files/archivo-latin-standard-normal.woff2",
      style: "normal",
    },
    {
      path: "../node_modules/@fontsource-variable/archivo/files/archivo-latin-standard-italic.woff2",
      style: "italic",
    },
  ],
  weight: "100 900",
  declarations: [{ prop: "font-stretch", value: "62% 125%" }],
  variable: "--font-archivo",
  display: "swap",
});

export const mono = localFont({
  src: "../node_modules/@fontsource-variable/spline-sans-mono/files/spline-sans-mono-latin-wght-normal.woff2",
  weight: "300 700",
  variable: "--font-mono",
  display: "swap",
});

export const greek = localFont({
  src: "../node_modules/@fontsource-variable/commissioner/files/commissioner-greek-standard-normal.woff2",
  weight: "100 900",
  variable: "--font-greek",
  display: "swap",
  declarations: [{ prop: "unicode-range", value: "U+0370-03FF, U+2126, U+00B5" }],
  preload: false,
});
