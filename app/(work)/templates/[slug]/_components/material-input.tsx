"use client";

import { useId } from "react";
import { HatchSwatch } from "@/app/_components/section-strip/hatches";
import { SymbolText } from "@/app/_components/symbol";
import type { MaterialInput as MaterialDeclaration } from "@/lib/calculation/definition";
import { classHatch } from "@/lib/sheet/section-model";
import type { MaterialState } from "./form-state";
import type { MaterialChoice } from "./material-choice";

interface PickerProps {
  id: string;
  label: string;
  needs: readonly string[];
  orConstant?: boolean;
  disabled?: boolean;
  slug: string;
  constant: { text: string; unit: string } | null;
  materials: readonly MaterialChoice[];
  onPick: (slug: string, constant: { text: string; unit: string } | null) => void;
  /** The element that says what is wrong with the choice, when something is. */
  faultId?: string;
}

/* No slug has a colon. */
const constantKey = ":constant";

/** Library of materials that have what is needed, or a constant typed in their place. */
export function MaterialPicker({
  id,
  label,
  needs,
  orConstant,
  disabled,
  slug,
  constant,
  materials,
  onPick,
  faultId,
}: PickerProps) {
  const fitting = materials.filter((material) =>
    needs.every((property) => material.properties.includes(property)),
  );
  const groups = [...new Set(fitting.map((material) => material.class))].sort();
  const border = faultId ? "border-fault" : "border-(--field-rule)";
  const told = { "aria-invalid": faultId ? true : undefined, "aria-describedby": faultId };
  return (
    <div className="grid min-w-0 gap-1">
      <select
        id={id}
        disabled={disabled}
        value={constant ? constantKey : slug}
        onChange={(event) =>
          event.target.value === constantKey
            ? onPick("", { text: "", unit: "W/(m·K)" })
            : onPick(event.target.value, null)
        }
        {...(constant ? {} : told)}
        aria-label={label}
        className={`h-8 w-full min-w-0 rounded border bg-field pl-2 pr-6 disabled:text-muted max-md:h-11 ${border}`}
      >
        {slug === "" && !constant ? <option value="">choose a material</option> : null}
        {slug !== "" && !fitting.some((material) => material.slug === slug) ? (
          <option value={slug}>{slug}</option>
        ) : null}
        {orConstant ? <option value={constantKey}>a constant, typed</option> : null}
        {groups.map((group) => (
          <optgroup key={group} label={group}>
            {fitting
              .filter((material) => material.class === group)
              .map((material) => (
                <option key={material.slug} value={material.slug} className="bg-sheet text-ink">
                  {material.name}
                </option>
              ))}
          </optgroup>
        ))}
      </select>
      {constant ? (
        <input
          value={constant.text}
          onChange={(event) => onPick("", { text: event.target.value, unit: constant.unit })}
          placeholder="0.045 W/(m·K)"
          {...told}
          aria-label={`${label}, constant value with unit`}
          maxLength={80}
          className={`num h-8 w-full rounded border bg-field px-2 text-right text-[13px] max-md:h-11 ${border}`}
        />
      ) : null}
    </div>
  );
}

interface Props {
  input: MaterialDeclaration;
  state: MaterialState;
  materials: readonly MaterialChoice[];
  onChange: (state: MaterialState) => void;
  fault?: string;
}

/** One material of the form, with its valid range, service limit and source. */
export function MaterialInput({ input, state, materials, onChange, fault }: Props) {
  const id = useId();
  const chosen = materials.find((material) => material.slug === state.slug);
  return (
    <div className="grid grid-cols-[minmax(0,1fr)_minmax(0,224px)] items-start gap-x-3 py-[5px] max-sm:grid-cols-[minmax(0,1fr)_200px]">
      <label htmlFor={id} className="grid grid-cols-[44px_1fr] items-center gap-1.5 pt-0.5">
        {chosen ? (
          <HatchSwatch hatch={classHatch[chosen.class]} id={`${id}-hatch`} />
        ) : (
          <SymbolText symbol={input.symbol} />
        )}
        <span>{input.label}</span>
      </label>
      <MaterialPicker
        id={id}
        label={input.label}
        needs={input.needs}
        orConstant={input.orConstant}
        disabled={input.fixed}
        slug={state.slug}
        constant={state.constant}
        materials={materials}
        onPick={(slug, constant) => onChange({ ...state, slug, constant, origin: "typed" })}
        faultId={fault ? `${id}-fault` : undefined}
      />
      <div className="col-span-2 text-[12px] leading-4">
        {fault ? (
          <p id={`${id}-fault`} className="mt-0.5 text-fault">
            {fault}
          </p>
        ) : null}
        {chosen ? (
          <p className="mt-0.5 text-muted">
            {chosen.ranges[input.needs[0] ?? "k"] ? `valid ${chosen.ranges[input.needs[0] ?? "k"]}; ` : ""}
            {chosen.service ? `service ${chosen.service}; ` : ""}
            {chosen.source}
          </p>
        ) : null}
      </div>
    </div>
  );
}
