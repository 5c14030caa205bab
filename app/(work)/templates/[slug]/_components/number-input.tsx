"use client";

import type { NumberInput as NumberDeclaration } from "@/lib/calculation/definition";
import { QuantityField } from "@/app/_components/quantity-field";
import { readAmount } from "./build-request";
import type { NumberState } from "./form-state";
import { convertText, unitsFor } from "./use-units";

interface Props {
  input: NumberDeclaration;
  state: NumberState;
  onChange: (state: NumberState) => void;
  fault?: string;
  notice?: string;
}

function usualRange(input: NumberDeclaration): string | null {
  const { usualMin, usualMax, unit } = input;
  const text = unit === "1" ? "" : ` ${unit}`;
  if (usualMin !== undefined && usualMax !== undefined) return `usual ${usualMin} to ${usualMax}${text}`;
  if (usualMin !== undefined) return `usual from ${usualMin}${text}`;
  return usualMax === undefined ? null : `usual up to ${usualMax}${text}`;
}

/** One number of the form: reads a unit that is typed with the number, converts when another unit is picked. */
export function NumberInput({ input, state, onChange, fault, notice }: Props) {
  const note =
    notice ?? (state.origin === "default" ? "default, not typed" : (input.note ?? usualRange(input)));

  // A unit typed with the number moves to the picker once the field is left: "3 in" becomes 3 and in.
  const settle = () => {
    const amount = readAmount(input, state.text, state.unit);
    if (amount.ok && amount.unit !== state.unit)
      onChange({ ...state, text: String(amount.value), unit: amount.unit, origin: "typed" });
  };

  const pick = (unit: string) => {
    const amount = readAmount(input, state.text, state.unit);
    const converted = amount.ok ? convertText(amount.value, amount.unit, unit, input.quantity) : null;
    onChange({ ...state, unit, text: converted ?? state.text });
  };

  return (
    <QuantityField
      symbol={input.symbol}
      label={input.label}
      text={state.text}
      unit={state.unit}
      units={unitsFor(input.quantity, input.unit)}
      onText={(text) => onChange({ ...state, text, origin: "typed" })}
      onUnit={pick}
      onBlur={settle}
      fault={fault}
      note={note}
    />
  );
}
