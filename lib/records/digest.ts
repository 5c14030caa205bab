import { createHash } from "node:crypto";
import { canonicalText } from "@/lib/calculation/canonical";

/** What a record's digest covers: everything kept with it except tags, signatures and a void. */
export interface RecordContent {
  number: number;
  template: string;
  revision: number;
  definitionHash: string;
  engineVersion: string;
  nodeVersion: string;
  given: unknown;
  evaluation: unknown;
  title: string;
  note: string;
  actorKind: string;
  actorId: string;
  ownerId: string | null;
  createdAt: Date;
}

/** SHA-256, hex, of the canonical JSON (RFC 8785) of the content. */
export function recordDigest(content: RecordContent): string {
  const { createdAt, ...rest } = content;
  const text = canonicalText({ ...rest, createdAt: createdAt.toISOString() });
  return createHash("sha256").update(text).digest("hex");
}
