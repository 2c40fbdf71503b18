import type { Config } from "tailwindcss";

const config: Config = {
  content: ["./app/**/*.{ts,tsx}", "./components/**/*.{ts,tsx}"],
  darkMode: "class",
  theme: {
    extend: {
      colors: {
        paper: "var(--paper)",
        sheet: "var(--sheet)",
        ink: "var(--ink)",
        faint: "var(--faint)",
        contour: "var(--contour)",
        water: "var(--water)",
        forest: "var(--forest)",
        peg: "var(--peg)",
        warn: "var(--warn)",
        bad: "var(--bad)",
        hairline: "var(--hairline)",
        wash: "var(--wash)",
      },
      fontFamily: {
        heading: ["var(--font-heading)", "var(--font-heading-ext)", "Georgia", "serif"],
        sans: ["var(--font-text)", "var(--font-text-ext)", "system-ui", "sans-serif"],
        mono: ["var(--font-mono)", "ui-monospace", "monospace"],
      },
      borderRadius: { sheet: "2px" },
      maxWidth: { desk: "88rem", measure: "42rem" },
    },
  },
};

export default config;
