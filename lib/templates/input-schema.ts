import type { Column, Definition, Input } from "@/lib/calculation/definition";
import { compatibleUnits, quantityByName } from "@/lib/units";

/** JSON Schema (2020-12) of what `inputs` of a run may hold, from the definition alone. */

export type JsonSchema = Record<string, unknown>;

const material: JsonSchema = {
  type: "string",
  maxLength: 80,
  pattern: "^[a-z0-9]+(-[a-z0-9]+)*(@[1-9][0-9]*)?$",
  description: "Slug of a material, or slug@revision.",
};

function numberValue(input: Extract<Column, { kind: "number" }>): JsonSchema {
  const quantity = quantityByName(input.quantity);
  const units = quantity ? [...new Set([input.unit, ...compatibleUnits(quantity)])] : [input.unit];
  const bounds: JsonSchema = {
    ...(input.min === undefined ? {} : { minimum: input.min }),
    ...(input.max === undefined ? {} : { maximum: input.max }),
    ...(input.above === undefined ? {} : { exclusiveMinimum: input.above }),
    ...(input.below === undefined ? {} : { exclusiveMaximum: input.below }),
  };
  return {
    anyOf: [
      { type: "number", ...bounds, description: `In ${input.unit}.` },
      {
        type: "object",
        properties: {
          value: { type: "number" },
          unit: { type: "string", maxLength: 64, examples: units, description: "Any unit of the quantity." },
          uncertainty: { type: "number", minimum: 0 },
          halfWidth: { type: "number", minimum: 0 },
          distribution: { enum: ["normal", "uniform", "triangular"] },
          degreesOfFreedom: { type: "number", exclusiveMinimum: 0 },
        },
        required: ["value"],
        additionalProperties: false,
      },
    ],
    "x-quantity": input.quantity,
    "x-unit": input.unit,
    ...(input.default === undefined ? {} : { default: input.default }),
  };
}

function valueOf(input: Column): JsonSchema {
  switch (input.kind) {
    case "number":
      return numberValue(input);
    case "choice":
      return {
        enum: input.options.map((option) => option.key),
        ...(input.default === undefined ? {} : { default: input.default }),
      };
    case "text":
      return { type: "string", maxLength: input.maxLength };
    case "material": {
      const constant = {
        type: "object",
        properties: { value: { type: "number" }, unit: { type: "string", maxLength: 64 } },
        required: ["value"],
        additionalProperties: false,
      };
      const given =
        input.orConstant === true ? { anyOf: [material, { type: "number" }, constant] } : material;
      return { ...given, ...(input.default === undefined ? {} : { default: input.default }) };
    }
  }
}

function described(schema: JsonSchema, input: Column | Input): JsonSchema {
  const note = "note" in input ? input.note : undefined;
  return { title: input.label, ...(note === undefined ? {} : { description: note }), ...schema };
}

function inputValue(input: Input): JsonSchema {
  if (input.kind !== "table") return described(valueOf(input), input);
  return described(
    {
      type: "array",
      minItems: input.minRows,
      maxItems: input.maxRows,
      items: {
        type: "object",
        properties: Object.fromEntries(
          input.columns.map((column) => [column.symbol, described(valueOf(column), column)]),
        ),
        additionalProperties: false,
      },
      default: input.default,
    },
    input,
  );
}

/** Without a default, and applying always. */
function isRequired(input: Input): boolean {
  return input.kind !== "table" && input.default === undefined && input.appliesWhen === undefined;
}

/** The schema of a definition's inputs. Fixed materials are no inputs to a caller. */
export function inputSchema(definition: Definition, id: string) {
  const inputs = definition.inputs.filter((input) => !(input.kind === "material" && input.fixed === true));
  return {
    $schema: "https://json-schema.org/draft/2020-12/schema",
    $id: id,
    title: definition.title,
    type: "object" as const,
    properties: Object.fromEntries(inputs.map((input) => [input.symbol, inputValue(input)])),
    required: inputs.filter(isRequired).map((input) => input.symbol),
    additionalProperties: false as const,
  };
}
