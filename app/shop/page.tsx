import type { Metadata } from "next";
import { ShopPage } from "@/components/shop/shop-page";

export const metadata: Metadata = { title: "Shop" };

export default function ShopRoute() {
  return <ShopPage />;
}
