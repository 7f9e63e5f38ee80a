import type { Metadata, Viewport } from "next";
import { headers } from "next/headers";
import type { ReactNode } from "react";
import { Shell } from "@/components/shell/shell";
import "./globals.css";

export const metadata: Metadata = {
  title: { default: "Quarterline", template: "%s - Quarterline" },
  description: "Isometric spool sheets, cut lists and weld maps from field dimensions.",
};

export const viewport: Viewport = { themeColor: "#faf7f0" };

/** Reading the request's headers keeps every page dynamic: a page made at build time would carry no script nonce. */
export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  await headers();
  return (
    <html lang="en">
      <body>
        <Shell>{children}</Shell>
      </body>
    </html>
  );
}
