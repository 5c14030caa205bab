"use client";

import { useId, type ReactNode } from "react";
import { SymbolText } from "./symbol";

interface QuantityFieldProps {
  symbol: string;
  label: string;
  text: string;
  unit: string;
  units: readonly string[];
  onText: (text: string) => void;
  onUnit: (unit: string) => void;
  onBlur?: () => void;
  /** What is wrong with the text, as a sentence. */
  fault?: string;
  /** Where the value came from, usual range, what was understood. */
  note?: ReactNode;
}

/** A number with its unit: what is typed stays as typed; picking another unit converts it. */
export function QuantityField({
  symbol,
  label,
  text,
  unit,
  units,
  onText,
  onUnit,
  onBlur,
  fault,
  note,
}: QuantityFieldProps) {
  const id = useId();
  const offered = units.includes(unit) ? units : [unit, ...units];
  return (
    <div className="grid grid-cols-[minmax(0,1fr)_176px] items-center gap-x-3 py-[5px] max-sm:grid-cols-[minmax(0,1fr)_164px]">
      <label htmlFor={id} className="grid grid-cols-[44px_1fr] items-baseline gap-1.5">
        <SymbolText symbol={symbol} />
        <span>{label}</span>
      </label>
      <div
        className={`grid h-8 grid-cols-[1fr_auto] rounded border bg-field focus-within:outline focus-within:outline-2 focus-within:outline-offset-1 focus-within:outline-ink max-md:h-11 ${fault ? "border-fault" : "border-rule"}`}
      >
        <input
          id={id}
          value={text}
          onChange={(event) => onText(event.target.value)}
          onBlur={onBlur}
          inputMode="text"
          autoComplete="off"
          spellCheck={false}
          maxLength={80}
          aria-invalid={fault ? true : undefined}
          aria-describedby={`${id}-note`}
          className="num w-full min-w-0 bg-transparent px-2 text-right font-medium outline-none"
        />
        {unit === "1" && offered.length === 1 ? (
          <span
            className="min-w-[74px] border-l border-soft px-2 text-[13px] leading-[30px] text-muted max-md:leading-[42px]"
            aria-hidden="true"
          >
            {"\u2013"}
          </span>
        ) : (
          <select
            value={unit}
            onChange={(event) => onUnit(event.target.value)}
            aria-label={`Unit of ${label}`}
            className="w-[82px] rounded-r border-l border-soft bg-transparent px-1.5 text-[13px] text-muted focus-visible:outline-offset-[-2px]"
          >
            {offered.map((option) => (
              <option key={option} value={option} className="bg-sheet text-ink">
                {option === "1" ? "\u2013" : option}
              </option>
            ))}
          </select>
        )}
      </div>
      <div id={`${id}-note`} className="col-span-2 text-[12px] leading-4">
        {fault ? <p className="mt-0.5 text-fault">{fault}</p> : null}
        {note ? <p className="ml-auto mt-0.5 max-w-[176px] text-muted max-sm:max-w-[164px]">{note}</p> : null}
      </div>
    </div>
  );
}
