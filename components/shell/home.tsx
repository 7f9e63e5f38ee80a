"use client";
import { useRouter } from "next/navigation";
import { useEffect } from "react";
import { Loaded } from "@/components/ui/loaded";
import { homeOf } from "./places";
import { useViewer } from "./use-viewer";

/** Sends each role to where its day starts. */
export function Home() {
  const viewer = useViewer();
  const router = useRouter();
  const role = viewer.data?.role;
  useEffect(() => {
    if (role) router.replace(homeOf(role));
  }, [role, router]);
  return (
    <>
      <h1 className="sr-only">Quarterline</h1>
      <Loaded api={viewer} label="Opening your shop">
        {() => null}
      </Loaded>
    </>
  );
}
