import type { ReactNode } from "react";
import { SymbolText } from "../symbol";
import { formatSignificant } from "@/lib/units";
import type { Definition } from "@/lib/calculation/definition";
import type { Evaluation, LimitVerdict } from "@/lib/calculation/evaluation";

/** A dash for what holds, a triangle for a caution, a barred square for a stop: neutral, told by shape and word. */
function LimitMark({ level, broken }: { level: "caution" | "stop"; broken: boolean }) {
  return (
    <svg
      viewBox="0 0 16 16"
      width="16"
      height="16"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.5"
      className="mt-0.5"
      aria-hidden="true"
    >
      {!broken ? (
        <path d="M2 8h12" />
      ) : level === "caution" ? (
        <path d="M8 2 14.6 14H1.4zM8 6.2v4M8 11.4v1.2" />
      ) : (
        <path d="M2.5 2.5h11v11h-11zM5 8h6" strokeWidth="1.8" />
      )}
    </svg>
  );
}

function verdictText(limit: LimitVerdict): string {
  if (limit.broken) return limit.level === "stop" ? "broken, stop" : "broken";
  return "not broken";
}

function detail(limit: LimitVerdict): string | null {
  if (limit.broken) return limit.message ?? null;
  if (limit.value === undefined || limit.unit === undefined) return null;
  const unit = limit.unit === "1" ? "" : ` ${limit.unit}`;
  return `${formatSignificant(limit.value, 4)}${unit} with the inputs as entered`;
}

/** Limits in words, cautions, standing notices, and which inputs nobody has typed. */
export function LimitsPane({
  definition,
  evaluation,
  stale,
}: {
  definition: Definition;
  evaluation: Evaluation | null;
  stale: boolean;
}) {
  const defaulted = evaluation?.defaulted ?? [];
  const extra = (evaluation?.cautions ?? []).filter(
    (caution) => !evaluation?.limits.some((limit) => limit.broken && limit.code === caution.code),
  );
  const notices =
    evaluation?.notices ?? definition.notices.map((message, index) => ({ code: `notice-${index}`, message }));
  return (
    <div
      className={`min-w-0 border-rule px-6 pb-5 pt-4 max-lg:border-t max-md:px-4 lg:border-l ${stale ? "waiting" : ""}`}
    >
      <h2 className="mb-2.5">Limits</h2>
      <ul aria-live="polite">
        {(evaluation?.limits ?? []).map((limit) => (
          <Item
            key={limit.code}
            level={limit.level}
            broken={limit.broken}
            title={`${limit.label}: ${verdictText(limit)}`}
            text={detail(limit)}
          />
        ))}
        {extra.map((caution) => (
          <Item
            key={`${caution.code}${caution.pointer ?? ""}`}
            level="caution"
            broken
            title={caution.message}
            text={null}
          />
        ))}
        {defaulted.length > 0 ? (
          <Item
            level="caution"
            broken
            title={<Defaulted definition={definition} symbols={defaulted} />}
            text={null}
          />
        ) : null}
        {evaluation && evaluation.limits.length === 0 && extra.length === 0 && defaulted.length === 0 ? (
          <li className="py-1.5 text-muted">No limits beyond the bounds of the inputs.</li>
        ) : null}
      </ul>
      <div className="mt-2.5 grid gap-2 border-t border-soft pt-2.5 text-[13px] leading-[18px] text-muted">
        {notices.map((notice) => (
          <p key={notice.code + notice.message}>{notice.message}</p>
        ))}
      </div>
    </div>
  );
}

/** Which inputs nobody has typed: by symbol for the eye, by name for the ear. */
function Defaulted({ definition, symbols }: { definition: Definition; symbols: readonly string[] }) {
  const label = (symbol: string) =>
    definition.inputs.find((input) => input.symbol === symbol)?.label ?? symbol;
  return (
    <>
      {symbols.length === 1
        ? "One input is an untouched default: "
        : `${symbols.length} inputs are untouched defaults: `}
      {symbols.map((symbol, index) => (
        <span key={symbol}>
          {index === 0 ? "" : ", "}
          <SymbolText symbol={symbol} />
          <span className="sr-only">{label(symbol)}</span>
        </span>
      ))}
    </>
  );
}

function Item({
  level,
  broken,
  title,
  text,
}: {
  level: "caution" | "stop";
  broken: boolean;
  title: ReactNode;
  text: string | null;
}) {
  return (
    <li className="grid grid-cols-[20px_1fr] gap-2 py-1.5">
      <LimitMark level={level} broken={broken} />
      <div>
        <p className={broken && level === "stop" ? "font-[620]" : ""}>{title}</p>
        {text ? <p className="text-[13px] text-muted">{text}</p> : null}
      </div>
    </li>
  );
}
