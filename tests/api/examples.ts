import type { Operation } from "@/lib/http/operation";
import type { ExampleRequest } from "@/lib/http/operation";

/** Address of an operation with an example's parameters and query. */
export function addressOf(operation: Operation, example: ExampleRequest): string {
  const path = operation.path.replace(/\{(\w+)\}/g, (_, name: string) =>
    encodeURIComponent(example.params?.[name] ?? ""),
  );
  const query = new URLSearchParams(example.query ?? {}).toString();
  return query === "" ? path : `${path}?${query}`;
}
