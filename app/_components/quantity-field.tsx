"use client";

import { useId, type ReactNode } from "react";
import { SymbolText } from "./symbol";
import { UnitSelect } from "./unit-select";

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
  return (
    <div className="grid grid-cols-[minmax(0,1fr)_176px] items-center gap-x-3 py-[5px] max-sm:grid-cols-[minmax(0,1fr)_164px]">
      <label htmlFor={id} className="grid grid-cols-[minmax(44px,max-content)_1fr] items-baseline gap-1.5">
        <SymbolText symbol={symbol} />
        <span>{label}</span>
      </label>
      <div
        className={`grid h-8 grid-cols-[1fr_auto] rounded border bg-field focus-within:outline focus-within:outline-2 focus-within:outline-offset-1 focus-within:outline-ink max-md:h-11 ${fault ? "border-fault" : "border-(--field-rule)"}`}
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
        {unit === "1" && units.length === 1 ? (
          <span
            className="min-w-[74px] border-l border-soft px-2 text-[13px] leading-[30px] text-muted max-md:leading-[42px]"
            aria-hidden="true"
          >
            {"\u2013"}
          </span>
        ) : (
          <UnitSelect
            value={unit}
            units={units}
            label={`Unit of ${label}`}
            onPick={onUnit}
            className="w-[84px] border-l border-soft pl-2 pr-1 text-[13px]"
          />
        )}
      </div>
      <div id={`${id}-note`} className="col-span-2 text-[12px] leading-4">
        {fault ? <p className="mt-0.5 text-fault">{fault}</p> : null}
        {note ? <p className="ml-auto mt-0.5 max-w-[176px] text-muted max-sm:max-w-[164px]">{note}</p> : null}
      </div>
    </div>
  );
}
