import { SymbolText } from "@/app/_components/symbol";
import type { Definition, Input } from "@/lib/calculation/definition";
import type { Origin, UsedCell } from "@/lib/calculation/evaluation";
import type { RecordView } from "@/lib/records/schemas";
import { formatExact } from "@/lib/units";

const originWords: Record<Origin, string> = {
  typed: "typed",
  default: "default, not typed",
  list: "from a list",
  tag: "from a tag",
  file: "from a file",
  record: "from another record",
};

function unitText(unit: string): string {
  return unit === "1" ? "" : ` ${unit}`;
}

/** A value as it was used: number with unit, option, or material with its revision. */
function cellText(cell: UsedCell | undefined, materialNames: Readonly<Record<string, string>>): string {
  if (cell === undefined) return "\u2013";
  if ("si" in cell) return `${formatExact(cell.value)}${unitText(cell.unit)}`;
  if ("material" in cell)
    return `${materialNames[cell.material] ?? cell.material}, revision ${cell.revision}`;
  if ("constant" in cell) return `${formatExact(cell.constant.value)}${unitText(cell.constant.unit)}`;
  return "option" in cell ? cell.option : cell.text;
}

/** Inputs as used, with where each came from. */
export function InputsTable({
  record,
  definition,
  materialNames,
}: {
  record: RecordView;
  definition: Definition;
  materialNames: Readonly<Record<string, string>>;
}) {
  const present = definition.inputs.filter((input) => input.symbol in record.inputs);
  const origin = (input: Input): string => {
    if (record.defaulted.includes(input.symbol)) return originWords.default;
    return originWords[record.origins[input.symbol] ?? "typed"];
  };
  return (
    <section className="min-w-0 border-rule max-md:border-b md:border-r" aria-label="Inputs">
      <div className="px-6 pb-4 pt-5 max-md:px-4">
        <h2 className="mb-2.5">Inputs</h2>
        <dl>
          {present
            .filter((input) => input.kind !== "table")
            .map((input) => {
              const used = record.inputs[input.symbol];
              if (used === undefined || "rows" in used) return null;
              const option =
                input.kind === "choice" && "option" in used
                  ? input.options.find((candidate) => candidate.key === used.option)?.label
                  : undefined;
              return (
                <div
                  key={input.symbol}
                  className="grid grid-cols-[44px_minmax(0,1fr)_auto] items-baseline gap-x-1.5 border-t border-soft py-1.5 first:border-t-0"
                >
                  <dt className="contents">
                    <SymbolText symbol={input.symbol} />
                    <span>{input.label}</span>
                  </dt>
                  <dd className="num text-right">{option ?? cellText(used, materialNames)}</dd>
                  <dd className="col-span-2 col-start-2 text-right text-[12px] text-muted">
                    {origin(input)}
                  </dd>
                </div>
              );
            })}
        </dl>
      </div>
      {present.map((input) => {
        const used = record.inputs[input.symbol];
        if (input.kind !== "table" || used === undefined || !("rows" in used)) return null;
        return (
          <div key={input.symbol} className="overflow-x-auto border-t border-soft px-6 pb-4 pt-3 max-md:px-4">
            <h2 className="mb-1">
              {input.label} <small>{origin(input)}</small>
            </h2>
            <table className="w-full border-collapse text-[13px]">
              <thead>
                <tr>
                  {input.columns.map((column) => (
                    <th
                      key={column.symbol}
                      scope="col"
                      className={`py-1 pr-3 text-[12px] font-normal text-muted last:pr-0 ${column.kind === "number" ? "text-right" : "text-left"}`}
                    >
                      {column.label}
                    </th>
                  ))}
                </tr>
              </thead>
              <tbody>
                {used.rows.map((row, index) => (
                  <tr key={index} className="border-t border-soft">
                    {input.columns.map((column) => (
                      <td
                        key={column.symbol}
                        className={`py-1 pr-3 align-baseline last:pr-0 ${column.kind === "number" ? "num whitespace-nowrap text-right" : ""}`}
                      >
                        {cellText(row[column.symbol], materialNames)}
                      </td>
                    ))}
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
        );
      })}
    </section>
  );
}
