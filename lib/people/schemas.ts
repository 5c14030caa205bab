import { z } from "zod";
import { defaultsPolicies, roles, scopes } from "@/db/vocabulary";
import { slugPattern } from "@/lib/calculation/definition";

/** What the verbs of people, sessions and keys read. */

export const Email = z.string().trim().toLowerCase().max(254).pipe(z.email("This is not an e-mail address."));
export const PersonName = z.string().trim().min(1, "Give a name.").max(120);

export const SignInInput = z.strictObject({
  email: z.string().trim().min(1).max(254),
  password: z.string().min(1).max(1024),
});

export const SetUpInput = z.strictObject({
  code: z.string().trim().min(1, "Copy the set-up code from the log of the server.").max(64),
  email: Email,
  name: PersonName,
  password: z.string().min(1, "Choose a password.").max(1024),
});

export const CreatePersonInput = z.strictObject({
  email: Email,
  name: PersonName,
  role: z.enum(roles),
  isAdmin: z.boolean().default(false),
  password: z.string().max(1024),
});

const cidr = z
  .union([z.cidrv4(), z.cidrv6()], { error: "Write a network as 10.2.0.0/16 or 2001:db8::/32." })
  .describe("Network in CIDR notation");

export const CreateKeyInput = z.strictObject({
  ownerId: z.string().min(1).max(64),
  label: z.string().trim().min(1).max(120),
  scopes: z.array(z.enum(scopes)).min(1, "Choose at least one scope.").max(scopes.length),
  templates: z.array(z.string().max(64).regex(slugPattern)).min(1).max(200).nullable().default(null),
  networks: z.array(cidr).min(1).max(50).nullable().default(null),
  defaultsPolicy: z.enum(defaultsPolicies).default("allow"),
  ratePerMinute: z.number().int().min(1).max(100_000).default(600),
  /** Days until it expires. */
  days: z.number().int().min(1).max(730),
});

export type SignInInput = z.infer<typeof SignInInput>;
export type SetUpInput = z.input<typeof SetUpInput>;
export type CreatePersonInput = z.input<typeof CreatePersonInput>;
export type CreateKeyInput = z.input<typeof CreateKeyInput>;
