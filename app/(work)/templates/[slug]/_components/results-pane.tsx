"use client";

import { NumberText } from "@/app/_components/number-text";
import { SymbolText } from "@/app/_components/symbol";
import type { Definition, Result } from "@/lib/calculation/definition";
import type { Evaluation, ResultValue } from "@/lib/calculation/evaluation";
import { UnitSelect } from "@/app/_components/unit-select";
import { unitsFor } from "./use-units";

interface Props {
  definition: Definition;
  evaluation: Evaluation | null;
  stale: boolean;
  pending: boolean;
  /** Labels of fields that cannot be run with. */
  waiting: readonly string[];
  /** Sentences that belong to no field. */
  general: readonly string[];
  onUnit: (symbol: string, unit: string) => void;
}

/** Results in the author's order, the first two large; each in the unit that one picks. */
export function ResultsPane({ definition, evaluation, stale, pending, waiting, general, onUnit }: Props) {
  return (
    <div className="min-w-0 px-6 pb-5 pt-4 max-md:px-4">
      <h2 className="mb-2.5">
        Results
        {stale ? <small>waiting{waiting.length > 0 ? ` for: ${waiting.join(", ")}` : ""}</small> : null}
        {stale || !pending ? null : <small aria-hidden="true">running</small>}
      </h2>
      <div role="alert">
        {general.map((message) => (
          <p key={message} className="mb-2 border-l-[3px] border-fault pl-2.5 text-[13px] text-fault">
            {message}
          </p>
        ))}
      </div>
      <table
        className={`w-full border-collapse ${stale ? "waiting" : ""}`}
        aria-live="polite"
        aria-busy={pending}
      >
        <caption className="sr-only">Results{stale ? ", of the last run that could be done" : ""}</caption>
        <tbody>
          {definition.results.map((result, index) => (
            <ResultRow
              key={result.symbol}
              result={result}
              value={evaluation?.results[result.symbol]}
              big={index < 2 && !result.list}
              onUnit={(unit) => onUnit(result.symbol, unit)}
            />
          ))}
        </tbody>
      </table>
    </div>
  );
}

function ResultRow({
  result,
  value,
  big,
  onUnit,
}: {
  result: Result;
  value: ResultValue | undefined;
  big: boolean;
  onUnit: (unit: string) => void;
}) {
  const units = unitsFor(result.quantity, result.unit);
  const digits = result.digits ?? 4;
  const size = big ? "text-[28px] leading-8 font-[550]" : "text-[20px] leading-6 font-medium";
  return (
    <tr className="border-t border-soft first:border-t-0">
      <td className="w-[58px] py-[7px] align-baseline">
        <SymbolText symbol={result.symbol} />
      </td>
      <th scope="row" className="py-[7px] pr-2 text-left align-baseline font-normal">
        {result.label}
      </th>
      <td
        className={`num py-[7px] pr-2.5 text-right align-baseline ${result.list ? "text-[14px] leading-5" : `whitespace-nowrap ${size}`}`}
      >
        {value === undefined ? (
          <span className="text-muted">{"\u2013"}</span>
        ) : value.values ? (
          <span className="flex flex-wrap justify-end gap-x-3">
            {value.values.map((entry, index) => (
              <span key={index}>
                <NumberText value={entry} digits={digits} />
              </span>
            ))}
          </span>
        ) : (
          <NumberText value={value.value ?? Number.NaN} digits={digits} />
        )}
      </td>
      <td className="w-[88px] py-[7px] align-baseline text-muted">
        {units.length === 1 ? (
          <span>{result.unit === "1" ? "" : result.unit}</span>
        ) : (
          <UnitSelect
            value={value?.unit ?? result.unit}
            units={units}
            label={`Unit of ${result.label}`}
            onPick={onUnit}
          />
        )}
      </td>
    </tr>
  );
}
