import { operation } from "@/lib/http/operation";
import {
  CheckDefinitionBody,
  DefinitionCheck,
  DefinitionEvaluation,
  EvaluateDefinitionBody,
} from "@/lib/templates/schemas";
import { definition } from "../examples";

const tag = "Definitions";
const scope = "templates:write";

const hash = "a3c1f0b2d4e5968778695a4b3c2d1e0f00112233445566778899aabbccddeeff";

export const checkDefinition = operation({
  id: "checkDefinition",
  method: "POST",
  path: "/definitions/check",
  summary: "Check a definition",
  description:
    "Everything that is wrong with a definition that is not saved, with its place, and the quantity and unit found for each line. Errors of the definition are the answer, not a refusal.",
  tag,
  scope,
  request: { body: CheckDefinitionBody },
  reply: { status: 200, description: "What was found", schema: DefinitionCheck },
  refusals: ["forbidden"],
  examples: {
    success: {
      summary: "A definition without errors",
      body: { definition },
      reply: {
        ok: true,
        diagnostics: [],
        lines: [{ symbol: "R", quantity: "thermal insulance", unit: "m²·K/W", shape: "number" }],
      },
    },
    failure: {
      summary: "A member that is not known",
      body: { definition, definitoin: {} },
      code: "unknown-member",
      detail: "“definitoin” is not known here. Did you mean “definition”?",
      errors: [
        {
          pointer: "#/definitoin",
          code: "unknown-member",
          message: "“definitoin” is not known here. Did you mean “definition”?",
          expected: "definition",
        },
      ],
    },
  },
});

export const evaluateDefinition = operation({
  id: "evaluateDefinition",
  method: "POST",
  path: "/definitions/evaluate",
  summary: "Run a definition that is not saved",
  description: "Runs the definition in the body. Nothing is kept. For seniors.",
  tag,
  scope,
  request: { body: EvaluateDefinitionBody, collects: true },
  reply: { status: 200, description: "The evaluation", schema: DefinitionEvaluation },
  refusals: [
    "forbidden",
    "definition-invalid",
    "missing-input",
    "not-accepted",
    "unknown-material",
    "outside-validity",
    "no-solution",
    "not-finite",
    "not-converged",
    "budget-exceeded",
  ],
  examples: {
    success: {
      summary: "Resistance of a layer",
      body: { definition, inputs: { t: 50 } },
      reply: {
        definitionHash: hash,
        engine: "1.0.0",
        status: "ok",
        inputs: {
          t: { value: 50, unit: "mm", ucum: "mm", si: 0.05 },
          k: { value: 0.04, unit: "W/(m·K)", ucum: "W/(m.K)", si: 0.04 },
        },
        defaulted: ["k"],
        results: {
          R: {
            value: 1.25,
            unit: "m²·K/W",
            ucum: "m2.K/W",
            label: "Resistance",
            quantity: "thermal insulance",
          },
        },
        limits: [],
        cautions: [],
        notices: [],
        materials: [],
      },
    },
    failure: {
      summary: "A definition with an error",
      body: { definition: { ...definition, working: "R = t/kk" } },
      code: "definition-invalid",
      detail: "The definition has errors. Line 1: `kk` is not known here.",
    },
  },
});
