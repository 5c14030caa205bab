import { sql } from "drizzle-orm";
import { check, index, integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { flag, instant, json, wordList } from "../columns";
import { defaultsPolicies, roles, type DefaultsPolicy, type Role, type Scope } from "../vocabulary";

export const people = sqliteTable(
  "people",
  {
    id: text("id").primaryKey(),
    /** Small letters; the name that one signs in with. */
    email: text("email").notNull(),
    name: text("name").notNull(),
    role: text("role").$type<Role>().notNull(),
    isAdmin: flag("is_admin").notNull(),
    /** argon2id; null for people who sign in elsewhere. */
    passwordHash: text("password_hash"),
    active: flag("active").notNull(),
    createdAt: instant("created_at").notNull(),
  },
  (t) => [
    uniqueIndex("people_email").on(t.email),
    check("people_email_small", sql`${t.email} = lower(${t.email})`),
    check("people_role", sql`${t.role} in ${wordList(roles)}`),
  ],
);

/** One row per sign-in; read on every request, so that ending it ends the cookie. */
export const sessions = sqliteTable(
  "sessions",
  {
    id: text("id").primaryKey(),
    personId: text("person_id")
      .notNull()
      .references(() => people.id),
    createdAt: instant("created_at").notNull(),
    expiresAt: instant("expires_at").notNull(),
    lastSeenAt: instant("last_seen_at").notNull(),
    endedAt: instant("ended_at"),
  },
  (t) => [
    index("sessions_person").on(t.personId),
    check("sessions_order", sql`${t.expiresAt} > ${t.createdAt}`),
  ],
);

/** Attempts to sign in that did not (or not yet) succeed; counted per account and in all. */
export const loginAttempts = sqliteTable(
  "login_attempts",
  {
    id: integer("id").primaryKey({ autoIncrement: true }),
    /** SHA-256 of the address typed, so that mistyped passwords in the field are not kept. */
    account: text("account").notNull(),
    at: instant("at").notNull(),
  },
  (t) => [index("login_attempts_account").on(t.account, t.at), index("login_attempts_at").on(t.at)],
);

export const keys = sqliteTable(
  "keys",
  {
    id: text("id").primaryKey(),
    /** HMAC-SHA-256 of the key, hex; the key itself is shown once and kept nowhere. */
    lookup: text("lookup").notNull(),
    /** Which KEY_SECRET made the lookup. */
    secretVersion: text("secret_version").notNull(),
    label: text("label").notNull(),
    /** Last characters, to tell keys apart in a list. */
    ending: text("ending").notNull(),
    ownerId: text("owner_id")
      .notNull()
      .references(() => people.id),
    scopes: json<Scope[]>("scopes").notNull(),
    /** Slugs that the key is limited to; null for all. */
    templates: json<string[]>("templates"),
    /** CIDR ranges that the key is limited to; null for all. */
    networks: json<string[]>("networks"),
    defaultsPolicy: text("defaults_policy").$type<DefaultsPolicy>().notNull(),
    ratePerMinute: integer("rate_per_minute").notNull(),
    createdAt: instant("created_at").notNull(),
    expiresAt: instant("expires_at").notNull(),
    revokedAt: instant("revoked_at"),
    lastUsedAt: instant("last_used_at"),
  },
  (t) => [
    uniqueIndex("keys_lookup").on(t.lookup),
    index("keys_owner").on(t.ownerId),
    check("keys_lookup_length", sql`length(${t.lookup}) = 64`),
    check("keys_order", sql`${t.expiresAt} > ${t.createdAt}`),
    check("keys_rate", sql`${t.ratePerMinute} between 1 and 1000000`),
    check("keys_policy", sql`${t.defaultsPolicy} in ${wordList(defaultsPolicies)}`),
    check("keys_scopes_json", sql`json_valid(${t.scopes})`),
  ],
);

/** Tokens already given out to instances in one window of a caller. */
export const rateWindows = sqliteTable(
  "rate_windows",
  {
    caller: text("caller").primaryKey(),
    /** Whole minutes since 1970. */
    window: integer("window").notNull(),
    leased: integer("leased").notNull(),
  },
  (t) => [check("rate_windows_leased", sql`${t.leased} >= 0`)],
);
