import "server-only";
import { eq } from "drizzle-orm";
import { keys, people } from "@/db/schema/people";
import { write } from "@/db/tx";
import type { Actor } from "@/lib/access/actor";
import { makeKey } from "@/lib/access/api-key";
import { keyLookup } from "@/lib/access/key-secrets";
import { permit } from "@/lib/access/permit";
import { appendAudit } from "@/lib/audit/append";
import { after, day, now } from "@/lib/core/clock";
import { env } from "@/lib/core/env";
import { CodedError } from "@/lib/core/errors";
import { newId } from "@/lib/core/ids";
import { parseInput } from "@/lib/core/parse";
import { CreateKeyInput } from "./schemas";

export interface NewKeyReply {
  id: string;
  /** The key itself: shown this once, kept nowhere. */
  key: string;
  expiresAt: Date;
}

/** Makes an API key for a person, oneself or (as administrator) another. */
export async function createKey(actor: Actor, input: CreateKeyInput): Promise<NewKeyReply> {
  const { days, ownerId, ...wanted } = parseInput(CreateKeyInput, input);
  const permitted = permit(actor, "key.create", { ownerId });
  if (wanted.networks !== null && env().TRUSTED_PROXIES === 0) {
    throw CodedError.from([
      {
        pointer: "#/networks",
        code: "invalid-input",
        message:
          "Networks need a declared number of trusted proxies (TRUSTED_PROXIES), else any caller can name an address.",
      },
    ]);
  }
  const key = makeKey();
  const id = newId("key");
  const createdAt = now();
  const expiresAt = after(createdAt, days * day);
  await write(async (tx) => {
    const [owner] = await tx
      .select({ active: people.active })
      .from(people)
      .where(eq(people.id, ownerId))
      .limit(1);
    if (!owner?.active) throw new CodedError("not-found", "The owner is not a person who is active here.");
    await tx
      .insert(keys)
      .values({ ...wanted, ...keyLookup(key), id, ownerId, ending: key.slice(-4), createdAt, expiresAt });
    await appendAudit(tx, permitted, {
      action: "key.created",
      object: `key:${id}`,
      details: {
        ownerId,
        scopes: wanted.scopes,
        templates: wanted.templates,
        expiresAt: expiresAt.toISOString(),
      },
    });
  });
  return { id, key, expiresAt };
}
