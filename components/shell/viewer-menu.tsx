"use client";
import { signOut } from "next-auth/react";
import { useEffect, useRef, type RefObject } from "react";
import { Button } from "@/components/ui/button";
import { apiSend, failureText } from "@/components/ui/fetcher";
import { useToast } from "@/components/ui/notice";
import type { Viewer } from "@/lib/rules/api-types";
import { ROLE_WORDS, homeOf } from "./places";

/** Who is signed in: name, role, shop, the other shops of the person, sign out. */
export function ViewerMenu({ viewer }: { readonly viewer: Viewer }) {
  const box = useRef<HTMLDetailsElement>(null);
  useCloseOutside(box);
  return (
    <details ref={box} className="relative self-center">
      <summary className="flex min-h-12 list-none items-center gap-2 text-right [&::-webkit-details-marker]:hidden">
        <span className="leading-tight">
          <span className="block font-medium">{viewer.name}</span>
          <span className="cell-label block">{ROLE_WORDS[viewer.role]}</span>
        </span>
        <svg aria-hidden viewBox="0 0 10 10" className="size-2.5">
          <path d="M1 3h8L5 8z" fill="currentColor" />
        </svg>
      </summary>
      <div className="absolute right-0 z-40 mt-1 w-72 border border-ink bg-sheet p-4 shadow-md">
        <p className="font-bold">{viewer.shop.name}</p>
        <p className="mb-3 text-sm break-all text-soft">{viewer.email}</p>
        <OtherShops viewer={viewer} />
        <Button className="w-full" onClick={() => void leave()}>
          Sign out
        </Button>
      </div>
    </details>
  );
}

async function leave(): Promise<void> {
  await signOut({ redirect: false });
  window.location.assign("/sign-in");
}

function OtherShops({ viewer }: { readonly viewer: Viewer }) {
  const say = useToast();
  const others = viewer.shops.filter((shop) => shop.id !== viewer.shop.id);
  if (others.length === 0) return null;
  return (
    <div className="mb-3">
      <p className="cell-label mb-1">Work in another shop</p>
      {others.map((shop) => (
        <Button
          key={shop.id}
          className="mb-2 w-full"
          onClick={() =>
            void apiSend("POST", "/api/viewer/shop", { shopId: shop.id })
              .then(() => window.location.assign(homeOf(shop.role)))
              .catch((failure: unknown) => say(failureText(failure), "trouble"))
          }
        >
          {shop.name} ({ROLE_WORDS[shop.role].toLowerCase()})
        </Button>
      ))}
    </div>
  );
}

/** Closes the menu on Escape (focus back on its head) and on a press elsewhere. */
function useCloseOutside(box: RefObject<HTMLDetailsElement | null>): void {
  useEffect(() => {
    const press = (event: PointerEvent) => {
      if (box.current?.open && !box.current.contains(event.target as globalThis.Node))
        box.current.open = false;
    };
    const key = (event: KeyboardEvent) => {
      if (event.key !== "Escape" || !box.current?.open) return;
      box.current.open = false;
      box.current.querySelector("summary")?.focus();
    };
    document.addEventListener("pointerdown", press);
    document.addEventListener("keydown", key);
    return () => {
      document.removeEventListener("pointerdown", press);
      document.removeEventListener("keydown", key);
    };
  }, [box]);
}
