import type { RecordItem } from "@/lib/records/schemas";

/** Who kept a record: a person by name, other software by its key. */
export function keeperText({ kind, name }: RecordItem["createdBy"]): string {
  return kind === "key" ? `key “${name}”` : name;
}
