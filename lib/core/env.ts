import "server-only";
import { z } from "zod";

/** Settings of this process, read once. A setting that is missing or unreadable stops the start with a sentence. */

const secret = (name: string) =>
  z
    .string({
      error: `${name} is missing. \`npm run up\` writes one to .env.local; elsewhere set at least 32 random characters.`,
    })
    .min(32, `${name} is too short. It needs at least 32 random characters.`);

const olderSecrets = z
  .string()
  .default("")
  .transform((text) =>
    text
      .split(",")
      .map((part) => part.trim())
      .filter((part) => part !== ""),
  );

const yes = z
  .enum(["0", "1", "true", "false", ""], { error: "Write 1 or 0." })
  .default("0")
  .transform((text) => text === "1" || text === "true");

const EnvSchema = z.object({
  NODE_ENV: z.enum(["development", "production", "test"]).default("development"),
  /** `file:…`, or the address of a libSQL server. */
  DATABASE_URL: z
    .string()
    .regex(/^(file:|libsql:|https?:|wss?:)/, "DATABASE_URL begins with file:, libsql:, http: or https:.")
    .default("file:data/coldface.db"),
  DATABASE_AUTH_TOKEN: z.string().optional(),
  /** Encrypts the session cookie and derives the set-up code. */
  AUTH_SECRET: secret("AUTH_SECRET"),
  /** HMAC of API keys. Former ones stay in KEY_SECRET_OLDER, separated by commas, until their keys have expired. */
  KEY_SECRET: secret("KEY_SECRET"),
  KEY_SECRET_OLDER: olderSecrets,
  /** HMAC of the audit trail. Former ones stay in AUDIT_SECRET_OLDER for as long as the trail is verified. */
  AUDIT_SECRET: secret("AUDIT_SECRET"),
  AUDIT_SECRET_OLDER: olderSecrets,
  /** Address that people type; https switches the cookies to `__Host-`. */
  PUBLIC_URL: z.url({ protocol: /^https?$/, error: "PUBLIC_URL is an http or https address." }).optional(),
  PORT: z.coerce.number({ error: "PORT is a number." }).int().min(1).max(65_535).default(3000),
  HOST: z.string().default("127.0.0.1"),
  SEED: z.enum(["demo", "starter"], { error: "SEED is demo or starter." }).default("demo"),
  ALLOW_DEMO: yes,
  /** Number of proxies in front whose X-Forwarded-For is believed. */
  TRUSTED_PROXIES: z.coerce
    .number({ error: "TRUSTED_PROXIES is a whole number." })
    .int()
    .min(0)
    .max(10)
    .default(0),
});

type Parsed = z.infer<typeof EnvSchema>;
export type Env = Omit<Parsed, "PUBLIC_URL"> & { PUBLIC_URL: string };

/** Reads settings from `source`. Throws one Error that lists everything wrong with them. */
export function readEnv(source: Record<string, string | undefined>): Env {
  const given = Object.fromEntries(Object.entries(source).filter(([, value]) => value !== ""));
  const parsed = EnvSchema.safeParse(given);
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) =>
      issue.message.includes(String(issue.path[0]))
        ? issue.message
        : `${String(issue.path[0])}: ${issue.message}`,
    );
    throw new Error(`The settings of this installation are not complete.\n  ${lines.join("\n  ")}`);
  }
  const { PUBLIC_URL, ...rest } = parsed.data;
  const publicUrl = PUBLIC_URL ?? `http://localhost:${rest.PORT}`;
  return { ...rest, PUBLIC_URL: publicUrl.replace(/\/+$/, "") };
}

let current: Env | undefined;

/** The settings of this process. */
export function env(): Env {
  current ??= readEnv(process.env);
  return current;
}
