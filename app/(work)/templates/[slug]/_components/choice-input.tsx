"use client";

import { useId } from "react";
import type { ChoiceInput as ChoiceDeclaration } from "@/lib/calculation/definition";
import { SymbolText } from "@/app/_components/symbol";
import type { ChoiceState } from "./form-state";

interface Props {
  input: ChoiceDeclaration;
  state: ChoiceState;
  onChange: (state: ChoiceState) => void;
  fault?: string;
}

/** One choice of the form. */
export function ChoiceInput({ input, state, onChange, fault }: Props) {
  const id = useId();
  return (
    <div className="grid grid-cols-[minmax(0,1fr)_minmax(0,224px)] items-center gap-x-3 py-[5px] max-sm:grid-cols-[minmax(0,1fr)_200px]">
      <label htmlFor={id} className="grid grid-cols-[minmax(44px,max-content)_1fr] items-baseline gap-1.5">
        <SymbolText symbol={input.symbol} />
        <span>{input.label}</span>
      </label>
      <select
        id={id}
        value={state.option}
        onChange={(event) => onChange({ ...state, option: event.target.value, origin: "typed" })}
        aria-invalid={fault ? true : undefined}
        aria-describedby={`${id}-note`}
        className={`h-8 w-full rounded border bg-field pl-2 pr-6 max-md:h-11 ${fault ? "border-fault" : "border-(--field-rule)"}`}
      >
        {state.option === "" ? <option value="">choose</option> : null}
        {input.options.map((option) => (
          <option key={option.key} value={option.key} className="bg-sheet text-ink">
            {option.label}
          </option>
        ))}
      </select>
      <div id={`${id}-note`} className="col-span-2 text-[12px] leading-4">
        {fault ? <p className="mt-0.5 text-fault">{fault}</p> : null}
        {state.origin === "default" ? (
          <p className="ml-auto mt-0.5 max-w-[224px] text-muted max-sm:max-w-[200px]">default, not chosen</p>
        ) : null}
      </div>
    </div>
  );
}
