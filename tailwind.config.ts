import type { Config } from "tailwindcss";

/** Names of the look. Every colour is a variable of globals.css, so that dark and print are one change. */
const config: Config = {
  content: ["./app/**/*.{ts,tsx}"],
  theme: {
    colors: {
      transparent: "transparent",
      current: "currentColor",
      film: "var(--film)",
      sheet: "var(--sheet)",
      ink: "var(--ink)",
      muted: "var(--muted)",
      rule: "var(--rule)",
      soft: "var(--soft)",
      field: "var(--field)",
      hatch: "var(--hatch)",
      hot: "var(--hot)",
      warm: "var(--warm)",
      cool: "var(--cool)",
      cold: "var(--cold)",
      issued: "var(--issued)",
      fault: "var(--fault)",
      code: "var(--code)",
    },
    borderRadius: { none: "0", DEFAULT: "2px", full: "9999px" },
    boxShadow: {},
    fontFamily: {
      sans: ["var(--font-archivo)", "var(--font-greek)", "sans-serif"],
      mono: ["var(--font-mono)", "var(--font-greek)", "monospace"],
    },
    screens: { sm: "520px", md: "761px", lg: "1080px", xl: "1360px" },
    extend: { maxWidth: { page: "1376px" } },
  },
};

export default config;
