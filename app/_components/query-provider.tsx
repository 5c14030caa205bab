"use client";

import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { useState, type ReactNode } from "react";
import { isPassing } from "./api-client";

/**
 * One query client for the signed-in pages. A refusal is an answer and is not asked again; a lost connection is. Calls
 * are made also where the browser believes to be offline: it is sometimes wrong, and a call that waits says nothing.
 */
export function QueryProvider({ children }: { children: ReactNode }) {
  const [client] = useState(
    () =>
      new QueryClient({
        defaultOptions: {
          queries: {
            staleTime: 60_000,
            refetchOnWindowFocus: false,
            networkMode: "always",
            refetchOnReconnect: true,
            retry: (failures, error) => failures < 2 && isPassing(error),
          },
          mutations: { networkMode: "always" },
        },
      }),
  );
  return <QueryClientProvider client={client}>{children}</QueryClientProvider>;
}
