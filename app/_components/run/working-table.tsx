import { NumberText } from "@/app/_components/number-text";
import type { Evaluation } from "@/lib/calculation/evaluation";

/** A statement of the working, typeset on the server. */
export interface WorkingRow {
  line: number;
  symbol: string;
  isFunction: boolean;
  /** KaTeX markup of the whole statement. */
  html: string;
  note: string | null;
  unit: string | null;
}

/** The working: each line as a formula, what it is, its value and unit in this run. */
export function WorkingTable({
  rows,
  evaluation,
  stale,
}: {
  rows: readonly WorkingRow[];
  evaluation: Evaluation | null;
  stale: boolean;
}) {
  const steps = new Map((evaluation?.steps ?? []).map((step) => [step.symbol, step]));
  return (
    <section
      className="border border-t-0 border-rule bg-sheet px-6 pb-2 pt-5 max-md:border-x-0 max-md:px-4 max-md:pt-4"
      aria-label="Working"
    >
      <h2 className="mb-2.5">
        Working <small>each line with its unit; values of this run</small>
      </h2>
      <ol className={stale ? "waiting" : ""}>
        {rows.map((row, index) => {
          const step = steps.get(row.symbol);
          const unit = step?.unit ?? row.unit;
          return (
            <li
              key={row.symbol}
              className="grid grid-cols-[28px_minmax(0,1fr)] items-center gap-x-3 border-t border-soft py-2 md:grid-cols-[28px_minmax(0,2.4fr)_minmax(0,1fr)_minmax(120px,auto)]"
            >
              <span className="num text-[12px] text-muted">{index + 1}</span>
              {/* KaTeX markup made on the server from the syntax tree; texts of the definition are escaped there. */}
              <div
                tabIndex={0}
                role="group"
                aria-label={`Formula of ${row.symbol}`}
                className="overflow-x-auto overflow-y-hidden py-1 text-[15px]"
                dangerouslySetInnerHTML={{ __html: row.html }}
              />
              <span className="col-start-2 text-[13px] text-muted md:col-start-auto">{row.note ?? ""}</span>
              <span className="num col-start-2 text-right md:col-start-auto">
                {step ? (
                  <>
                    <span className="inline-flex flex-wrap justify-end gap-x-3">
                      {(step.values ?? [step.value ?? Number.NaN]).map((value, place) => (
                        <span key={place}>
                          <NumberText value={value} digits={5} />
                        </span>
                      ))}
                    </span>{" "}
                    <span className="inline-block min-w-16 text-left font-sans text-muted">
                      {unit === "1" || unit === null ? "" : unit}
                    </span>
                  </>
                ) : row.isFunction ? (
                  <span className="font-sans text-[13px] text-muted">function</span>
                ) : null}
              </span>
            </li>
          );
        })}
      </ol>
    </section>
  );
}
