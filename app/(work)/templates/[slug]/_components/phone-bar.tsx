import { NumberText } from "@/app/_components/number-text";
import { SymbolText } from "@/app/_components/symbol";
import type { Definition } from "@/lib/calculation/definition";
import type { Evaluation } from "@/lib/calculation/evaluation";

/** On a phone: the two chief results and the worst limit at the thumb. */
export function PhoneBar({
  definition,
  evaluation,
  stale,
}: {
  definition: Definition;
  evaluation: Evaluation | null;
  stale: boolean;
}) {
  if (!evaluation) return null;
  const chief = definition.results.filter((result) => !result.list).slice(0, 2);
  const worst =
    evaluation.limits.find((limit) => limit.broken && limit.level === "stop") ??
    evaluation.limits.find((limit) => limit.broken);
  return (
    <div
      className={`fixed inset-x-0 bottom-0 z-30 bg-ink px-4 py-2 text-sheet md:hidden ${stale ? "[&>*]:opacity-80" : ""}`}
      aria-hidden="true"
    >
      <div className="flex items-center justify-between gap-3">
        {chief.map((result) => {
          const value = evaluation.results[result.symbol];
          return (
            <span key={result.symbol} className="min-w-0 truncate">
              <SymbolText symbol={result.symbol} />{" "}
              <span className="num whitespace-nowrap text-base font-[550]">
                {value?.value === undefined ? (
                  "\u2013"
                ) : (
                  <NumberText value={value.value} digits={result.digits ?? 3} />
                )}{" "}
                {value && value.unit !== "1" ? value.unit : ""}
              </span>
            </span>
          );
        })}
      </div>
      {stale ? (
        <p className="text-[12px]">Of the run before; the present one waits.</p>
      ) : worst ? (
        <p className="truncate text-[12px]">{`${worst.level === "stop" ? "Stop" : "Caution"}: ${worst.message ?? worst.label}`}</p>
      ) : null}
    </div>
  );
}
