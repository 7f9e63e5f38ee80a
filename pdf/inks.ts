/** Colours of the inks on paper. Chosen to read in grey: ink and dye print dark, grey stays legible, pale stays behind. */
import type { Ink } from "@/iso";

export const PAPER_INKS: Readonly<Record<Ink, string>> = {
  ink: "#111111",
  dye: "#1f4e8c",
  grey: "#6e6e6e",
  paper: "#ffffff",
  alert: "#a61c1c",
  pale: "#dedede",
};
