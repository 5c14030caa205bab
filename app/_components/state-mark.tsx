import type { ReactNode } from "react";
import type { RevisionState } from "@/db/vocabulary";

/* Each state has a word and a shape of its own, so that colour says nothing that they do not. */
const marks: Record<RevisionState, { word: string; tone: string; shape: ReactNode }> = {
  draft: { word: "Draft", tone: "text-muted", shape: <circle cx="7" cy="7" r="6" strokeDasharray="2.6 2" /> },
  in_check: {
    word: "In check",
    tone: "text-muted",
    shape: (
      <>
        <circle cx="7" cy="7" r="6" />
        <path d="M7 3.6V7l2.4 1.6" />
      </>
    ),
  },
  issued: {
    word: "Issued",
    tone: "text-issued",
    shape: (
      <>
        <circle cx="7" cy="7" r="6" />
        <path d="m4 7 2.2 2.2L10 5" />
      </>
    ),
  },
  superseded: {
    word: "Superseded",
    tone: "text-muted",
    shape: (
      <>
        <circle cx="7" cy="7" r="6" />
        <path d="M7 10V4.4M4.6 6.6 7 4.2l2.4 2.4" />
      </>
    ),
  },
  withdrawn: {
    word: "Withdrawn",
    tone: "text-fault",
    shape: (
      <>
        <circle cx="7" cy="7" r="6" />
        <path d="M3 11 11 3" />
      </>
    ),
  },
};

/** State of a revision by word and shape: "Issued, revision 3". */
export function StateMark({ state, revision }: { state: RevisionState; revision?: number }) {
  const mark = marks[state];
  return (
    <span className={`inline-flex items-center gap-[7px] text-[13px] font-semibold ${mark.tone}`}>
      <svg
        viewBox="0 0 14 14"
        width="14"
        height="14"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.6"
        aria-hidden="true"
      >
        {mark.shape}
      </svg>
      {mark.word}
      {revision === undefined ? "" : `, revision ${revision}`}
    </span>
  );
}
