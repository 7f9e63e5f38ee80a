"use client";
import clsx from "clsx";
import Link from "next/link";
import { usePathname, useRouter } from "next/navigation";
import { useEffect, type ReactNode } from "react";
import { Mark } from "@/components/ui/mark";
import { ToastRegion } from "@/components/ui/notice";
import type { Viewer } from "@/lib/rules/api-types";
import { isPublicPath, placeOfPath, placesFor } from "./places";
import { useViewer } from "./use-viewer";
import { ViewerMenu } from "./viewer-menu";

/** Head, page and foot. Pages render inside its one main landmark (id "main"). */
export function Shell({ children }: { readonly children: ReactNode }) {
  const path = usePathname();
  const open = isPublicPath(path);
  return (
    <ToastRegion>
      <a
        href="#main"
        className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:bg-dye focus:px-4 focus:py-3 focus:text-white"
      >
        Skip to the page
      </a>
      {open ? <BareHead /> : <TopBar path={path} />}
      <main
        id="main"
        tabIndex={-1}
        className={clsx(
          "mx-auto w-full px-4 py-5 outline-none sm:px-6",
          !path.startsWith("/lines/") && "max-w-[90rem]",
        )}
      >
        {children}
      </main>
    </ToastRegion>
  );
}

function BareHead() {
  return (
    <header className="border-b border-ink" data-screen-only>
      <div className="mx-auto max-w-[90rem] px-4 sm:px-6">
        <Brand />
      </div>
    </header>
  );
}

function Brand() {
  return (
    <Link href="/" className="inline-flex min-h-14 items-center gap-2.5 text-lg font-bold">
      <Mark className="size-8 text-dye" />
      Quarterline
    </Link>
  );
}

function TopBar({ path }: { readonly path: string }) {
  const viewer = useViewer();
  const router = useRouter();
  const signedOut = viewer.error?.status === 401;
  useEffect(() => {
    if (signedOut) router.replace(`/sign-in?next=${encodeURIComponent(window.location.pathname)}`);
  }, [signedOut, router]);
  return (
    <header className="border-b border-ink" data-screen-only>
      <div className="mx-auto flex max-w-[90rem] flex-wrap items-stretch justify-between gap-x-8 px-4 sm:px-6">
        <Brand />
        {viewer.data ? (
          <>
            <Places viewer={viewer.data} path={path} />
            <ViewerMenu viewer={viewer.data} />
          </>
        ) : null}
      </div>
    </header>
  );
}

function Places({ viewer, path }: { readonly viewer: Viewer; readonly path: string }) {
  const here = placeOfPath(path);
  return (
    <nav
      aria-label="Places"
      className="order-last flex w-full grow border-t border-hair sm:order-none sm:w-auto sm:border-t-0"
    >
      {placesFor(viewer).map((place) => (
        <Link
          key={place.href}
          href={place.href}
          aria-current={place.href === here ? "page" : undefined}
          className={clsx(
            "-mb-px flex min-h-12 grow items-center justify-center border-b-4 px-4 font-medium sm:grow-0",
            place.href === here ? "border-dye text-dye" : "border-transparent hover:border-hair",
          )}
        >
          {place.label}
        </Link>
      ))}
    </nav>
  );
}
