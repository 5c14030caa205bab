"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { useEffect, useState } from "react";
import { ApiProblem, callApi, isPassing } from "@/app/_components/api-client";
import type { TemplateEvaluation } from "@/lib/calculation/evaluation";
import type { BuiltRequest } from "./build-request";

/** A value that follows another once it has been still for a moment. */
export function useSettled<T>(value: T, milliseconds: number): T {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), milliseconds);
    return () => clearTimeout(timer);
  }, [value, milliseconds]);
  return settled;
}

interface Asked {
  slug: string;
  revision: number;
  built: BuiltRequest;
  units: Record<string, string>;
}

/** The present form, run by the API as one types. The last good answer stays in view while a text cannot be read. */
export function useEvaluation({ slug, revision, built, units }: Asked) {
  const readable = Object.keys(built.faults).length === 0;
  const body = readable ? JSON.stringify({ inputs: built.inputs, units, steps: true }) : "";
  const settled = useSettled(body, 120);
  const query = useQuery({
    queryKey: ["evaluate", slug, revision, settled],
    queryFn: ({ signal }) =>
      callApi<TemplateEvaluation>(`/templates/${slug}/revisions/${revision}/evaluate`, {
        body: JSON.parse(settled) as unknown,
        signal,
      }),
    enabled: readable && settled !== "",
    placeholderData: keepPreviousData,
    // A lost connection is said at once and tried until it is back; nobody has to press anything.
    retry: (_, error) => isPassing(error),
    retryDelay: (failures) => Math.min(1000 * 2 ** failures, 5000),
  });
  const failure = query.error ?? query.failureReason;
  const problem = readable && failure instanceof ApiProblem ? failure : null;
  // After a refusal the query holds no data; what was last answered is kept for the page to show as waiting.
  const [last, setLast] = useState<TemplateEvaluation | null>(null);
  if (query.data && query.data !== last) setLast(query.data);
  const pending = (query.isFetching && problem === null) || settled !== body;
  return { evaluation: query.data ?? last, problem, pending };
}
