import { parseArgs } from "node:util";
import { eq } from "drizzle-orm";
import { prepareConnections, reader } from "@/db/client";
import { people } from "@/db/schema/people";
import { scopes, type Scope } from "@/db/vocabulary";
import { createKey } from "@/lib/people/create-key";
import { runCommand, say } from "./terminal";

const usage = `npm run key -- --owner MAIL --scopes all|LIST --days N [--label TEXT] [--templates LIST] [--rate N]
  Makes an API key and prints it on the last line; it is shown this once.
  Scopes: ${scopes.join(", ")}`;

await runCommand(async () => {
  const { values } = parseArgs({
    options: {
      owner: { type: "string" },
      scopes: { type: "string" },
      days: { type: "string" },
      label: { type: "string", default: "made on the terminal" },
      templates: { type: "string" },
      rate: { type: "string", default: "600" },
    },
  });
  if (!values.owner || !values.scopes || !values.days) throw new Error(usage);
  await prepareConnections();
  const email = values.owner.trim().toLowerCase();
  const [owner] = await reader().select().from(people).where(eq(people.email, email)).limit(1);
  if (!owner) throw new Error(`There is no person with the address ${email}.`);

  const list = (text: string) =>
    text
      .split(",")
      .map((word) => word.trim())
      .filter((word) => word !== "");
  const wanted = values.scopes === "all" ? [...scopes] : list(values.scopes);
  const unknown = wanted.filter((scope) => !scopes.some((known) => known === scope));
  if (unknown.length > 0) throw new Error(`Unknown scope: ${unknown.join(", ")}.\n\n${usage}`);

  const made = await createKey(
    { kind: "system", reason: "npm run key" },
    {
      ownerId: owner.id,
      label: values.label,
      scopes: wanted as Scope[],
      templates: values.templates === undefined ? null : list(values.templates),
      ratePerMinute: Number(values.rate),
      days: Number(values.days),
    },
  );
  say(`Key of ${owner.email} (${owner.role}), valid until ${made.expiresAt.toISOString().slice(0, 10)}:`);
  say(made.key);
});
