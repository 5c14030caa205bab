import { sql, type AnyColumn } from "drizzle-orm";
import { check, integer, text } from "drizzle-orm/sqlite-core";
import { flag, instant, json, wordList } from "../columns";
import { revisionStates, type RevisionState } from "../vocabulary";

/** Who stands behind what arrives with Coldface, in the columns that name people. */
export const suppliedSet = "system";

/** Columns of a numbered state of anything that is drafted, checked and issued. */
export const revisionColumns = () => ({
  id: text("id").primaryKey(),
  number: integer("number").notNull(),
  state: text("state").$type<RevisionState>().notNull(),
  title: text("title").notNull(),
  /** Canonical JSON (RFC 8785) of the definition: the very text that is hashed. */
  definition: text("definition").notNull(),
  /** SHA-256 of `definition`, hex. */
  definitionHash: text("definition_hash").notNull(),
  /** Version of the engine that it was checked with. */
  engine: text("engine").notNull(),
  /** Everyone who saved a change or submitted; never the checker. */
  originatorIds: json<string[]>("originator_ids").notNull(),
  reasonForChange: text("reason_for_change"),
  createdAt: instant("created_at").notNull(),
  createdBy: text("created_by").notNull(),
  /** Moment of the last change while a draft. */
  changedAt: instant("changed_at").notNull(),
  submittedAt: instant("submitted_at"),
  submittedBy: text("submitted_by"),
  checkedBy: text("checked_by"),
  issuedAt: instant("issued_at"),
  issuedBy: text("issued_by"),
  /** For what arrived with Coldface: when, and by which two seniors of the works it was signed for. */
  adoptedAt: instant("adopted_at"),
  adoptedBy: json<string[]>("adopted_by"),
  supersededAt: instant("superseded_at"),
  withdrawnAt: instant("withdrawn_at"),
  withdrawnBy: text("withdrawn_by"),
  withdrawnReason: text("withdrawn_reason"),
  /** Planned end, announced before it comes. */
  withdrawalDate: instant("withdrawal_date"),
  /** When it must have been verified again. */
  verifyBy: instant("verify_by"),
  supplied: flag("supplied").notNull(),
});

type RevisionChecked = Record<keyof ReturnType<typeof revisionColumns>, AnyColumn>;

/** Rules that hold within one row, whatever writes it. */
export const revisionChecks = (name: string, t: RevisionChecked) => [
  check(`${name}_number`, sql`${t.number} >= 1`),
  check(`${name}_state`, sql`${t.state} in ${wordList(revisionStates)}`),
  check(`${name}_definition_json`, sql`json_valid(${t.definition})`),
  check(`${name}_hash_length`, sql`length(${t.definitionHash}) = 64`),
  check(`${name}_originators_json`, sql`json_valid(${t.originatorIds})`),
  check(
    `${name}_submitted`,
    sql`${t.state} = 'draft' or (${t.submittedAt} is not null and ${t.submittedBy} is not null)`,
  ),
  check(
    `${name}_issued`,
    sql`${t.state} in ('draft', 'in_check') or (${t.issuedAt} is not null and ${t.issuedBy} is not null and ${t.checkedBy} is not null)`,
  ),
  check(
    `${name}_checker`,
    sql`${t.supplied} = 1 or ${t.checkedBy} is null or instr(${t.originatorIds}, '"' || ${t.checkedBy} || '"') = 0`,
  ),
  check(`${name}_superseded`, sql`${t.state} <> 'superseded' or ${t.supersededAt} is not null`),
  check(
    `${name}_withdrawn`,
    sql`${t.state} <> 'withdrawn' or (${t.withdrawnAt} is not null and ${t.withdrawnBy} is not null and ${t.withdrawnReason} is not null)`,
  ),
  check(`${name}_adopted`, sql`(${t.adoptedAt} is null) = (${t.adoptedBy} is null)`),
];
