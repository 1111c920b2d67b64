"use client";

import type { ComponentProps } from "react";
import { FaultPage } from "@/components/ui/fault-page";
import { MAIN_ID } from "@/components/ui/skip-link";
import { Wordmark } from "@/components/ui/wordmark";

/** Where not even the head of the page could be made. */
export default function RootFault(props: ComponentProps<typeof FaultPage>) {
  return (
    <main id={MAIN_ID} className="mx-auto grid min-h-dvh max-w-lg content-center gap-6 px-4 py-12">
      <Wordmark />
      <FaultPage {...props} />
    </main>
  );
}
