"use client";

import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { useState, type ReactNode } from "react";

const makeClient = () =>
  new QueryClient({
    defaultOptions: {
      queries: { staleTime: 10_000, retry: 2 },
      mutations: { retry: 3, networkMode: "always" },
    },
  });

/** One cache for the live parts of the pages: lists, talk, uploads. Pages themselves come rendered from the server. */
export function LiveProvider({ children }: { children: ReactNode }) {
  const [client] = useState(makeClient);
  return <QueryClientProvider client={client}>{children}</QueryClientProvider>;
}
