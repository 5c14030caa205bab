import { NumberText } from "@/app/_components/number-text";
import { SymbolText } from "@/app/_components/symbol";
import type { Definition } from "@/lib/calculation/definition";
import type { RecordView } from "@/lib/records/schemas";

/** Results as they were kept, rounded for people; the API has every digit. */
export function RecordResults({ record, definition }: { record: RecordView; definition: Definition }) {
  return (
    <div className="min-w-0 px-6 pb-5 pt-4 max-md:px-4">
      <h2 className="mb-2.5">Results</h2>
      <table className="w-full border-collapse">
        <caption className="sr-only">Results</caption>
        <tbody>
          {definition.results.map((result, index) => {
            const value = record.results[result.symbol];
            const digits = result.digits ?? 4;
            const size = result.list
              ? "text-[14px] leading-5"
              : index < 2
                ? "whitespace-nowrap text-[28px] leading-8 font-[550]"
                : "whitespace-nowrap text-[20px] leading-6 font-medium";
            return (
              <tr key={result.symbol} className="border-t border-soft first:border-t-0">
                <td className="w-[58px] py-[7px] align-baseline">
                  <SymbolText symbol={result.symbol} />
                </td>
                <th scope="row" className="py-[7px] pr-2 text-left align-baseline font-normal">
                  {result.label}
                </th>
                <td className={`num py-[7px] pr-2.5 text-right align-baseline ${size}`}>
                  <span className="inline-flex flex-wrap justify-end gap-x-3">
                    {(value?.values ?? (value?.value === undefined ? [] : [value.value])).map(
                      (entry, place) => (
                        <span key={place}>
                          <NumberText value={entry} digits={digits} />
                        </span>
                      ),
                    )}
                  </span>
                </td>
                <td className="w-[84px] py-[7px] align-baseline text-muted">
                  {value && value.unit !== "1" ? value.unit : ""}
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
