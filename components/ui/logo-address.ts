import type { TitleBlock } from "@/iso";

/** Where the browser fetches a stored logo. */
export function logoAddress(logo: NonNullable<TitleBlock["logo"]>): string {
  return `/api/objects/logo/${encodeURIComponent(logo.key)}`;
}
