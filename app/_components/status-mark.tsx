import type { Status } from "@/lib/calculation/evaluation";

const words: Record<Status, string> = {
  ok: "No limit broken",
  caution: "Caution",
  stop: "Stop limit broken",
};

/** Status of a run by word and shape; neutral, for it is no permission. */
export function StatusMark({ status, voided = false }: { status: Status; voided?: boolean }) {
  return (
    <span className={`inline-flex items-center gap-1.5 text-[13px] ${status === "stop" ? "font-[620]" : ""}`}>
      <svg
        viewBox="0 0 16 16"
        width="14"
        height="14"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.5"
        aria-hidden="true"
      >
        {status === "ok" ? (
          <path d="M2 8h12" />
        ) : status === "caution" ? (
          <path d="M8 2 14.6 14H1.4zM8 6.2v4M8 11.4v1.2" />
        ) : (
          <path d="M2.5 2.5h11v11h-11zM5 8h6" />
        )}
      </svg>
      <span className={voided ? "line-through" : ""}>{words[status]}</span>
      {voided ? <span className="text-fault">void</span> : null}
    </span>
  );
}
