import { initialValues, type FormValues } from "@/app/(work)/templates/[slug]/_components/form-state";
import type { Definition, TableInput } from "@/lib/calculation/definition";

/** A form with one input of each kind. */

export const layers = {
  kind: "table",
  symbol: "layers",
  label: "Layers",
  columns: [
    { kind: "text", symbol: "name", label: "Name", maxLength: 80 },
    { kind: "number", symbol: "t", label: "Thickness", quantity: "length", unit: "mm", above: 0 },
    { kind: "material", symbol: "material", label: "Material", needs: ["k"], orConstant: true },
    {
      kind: "choice",
      symbol: "bond",
      label: "Bond",
      options: [
        { key: "dry", label: "Laid dry", values: {} },
        { key: "mortar", label: "In mortar", values: {} },
      ],
      default: "dry",
    },
  ],
  minRows: 1,
  maxRows: 4,
  default: [{ name: "Brick", t: 114, material: "fireclay-brick", bond: "mortar" }],
} as const satisfies Record<string, unknown> as unknown as TableInput;

export const definition = {
  inputs: [
    {
      kind: "number",
      symbol: "T_hot",
      label: "Hot face",
      quantity: "temperature",
      unit: "°C",
      default: 1100,
    },
    { kind: "number", symbol: "A", label: "Area", quantity: "area", unit: "m²", above: 0 },
    {
      kind: "choice",
      symbol: "case",
      label: "Surface",
      options: [
        { key: "held", label: "Temperature held", values: {} },
        { key: "convection", label: "In a fluid", values: {} },
      ],
    },
    {
      kind: "number",
      symbol: "h",
      label: "Coefficient",
      quantity: "heat transfer coefficient",
      unit: "W/(m²·K)",
      default: 10,
      appliesWhen: 'case == "convection"',
    },
    {
      kind: "material",
      symbol: "strut",
      label: "Material of the strut",
      needs: ["k"],
      orConstant: true,
      fixed: false,
    },
    layers,
  ],
  results: [],
} as unknown as Definition;

/** The form as it begins, with some fields changed as if somebody had typed. */
export function formWith(changes: Record<string, object>): FormValues {
  const values = initialValues(definition);
  return {
    inputs: Object.fromEntries(
      Object.entries(values.inputs).map(([symbol, state]) => [
        symbol,
        symbol in changes ? { ...state, origin: "typed", ...changes[symbol] } : state,
      ]),
    ) as FormValues["inputs"],
  };
}
