import type { Config } from "tailwindcss";

/** Where class names are found. The tokens (paper, ink, dye) stand in app/globals.css. */
const config: Config = { content: ["./app/**/*.{ts,tsx}", "./components/**/*.{ts,tsx}"] };

export default config;
