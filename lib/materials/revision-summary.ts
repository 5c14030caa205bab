import "server-only";
import type { RevisionState } from "@/db/vocabulary";
import type { NamedPerson } from "@/lib/people/names";
import type { RevisionMembers } from "./schemas";

/** Columns that revisions of materials and of templates have in common. */
export interface RevisionRow {
  number: number;
  state: RevisionState;
  title: string;
  definitionHash: string;
  engine: string;
  originatorIds: string[];
  reasonForChange: string | null;
  checkedBy: string | null;
  issuedAt: Date | null;
  issuedBy: string | null;
  adoptedAt: Date | null;
  supersededAt: Date | null;
  withdrawnAt: Date | null;
  withdrawnReason: string | null;
  withdrawalDate: Date | null;
  verifyBy: Date | null;
  supplied: boolean;
}

/** Everybody that a summary names. */
export function peopleOf(row: RevisionRow): (string | null)[] {
  return [...row.originatorIds, row.checkedBy, row.issuedBy];
}

const moment = (date: Date | null): string | null => date?.toISOString() ?? null;

export function revisionMembers(row: RevisionRow, nameOf: (id: string) => NamedPerson): RevisionMembers {
  const named = (id: string | null) => (id === null ? null : nameOf(id));
  return {
    revision: row.number,
    state: row.state,
    title: row.title,
    definitionHash: row.definitionHash,
    engine: row.engine,
    supplied: row.supplied,
    adopted: row.adoptedAt !== null,
    originators: row.originatorIds.map(nameOf),
    checkedBy: named(row.checkedBy),
    issuedBy: named(row.issuedBy),
    issuedAt: moment(row.issuedAt),
    supersededAt: moment(row.supersededAt),
    withdrawnAt: moment(row.withdrawnAt),
    withdrawnReason: row.withdrawnReason,
    withdrawalDate: moment(row.withdrawalDate),
    verifyBy: moment(row.verifyBy),
    reasonForChange: row.reasonForChange,
  };
}
