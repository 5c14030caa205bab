import { z } from "zod";
import { operation } from "@/lib/http/operation";
import { FunctionPage, QuantityPage } from "@/lib/templates/schemas";

const tag = "Units and functions";

const noQuery = {
  summary: "A query that is not read",
  query: { limit: "5" },
  code: "unknown-member",
  detail: "“limit” is not known here. This operation reads no query.",
  errors: [
    {
      pointer: "#/query/limit",
      code: "unknown-member",
      message: "“limit” is not known here. This operation reads no query.",
    },
  ],
} as const;

export const listQuantities = operation({
  id: "listQuantities",
  method: "GET",
  path: "/quantities",
  summary: "List quantities and units",
  description:
    "The named quantities with the units offered for each, as engineers write them and as UCUM codes.",
  tag,
  scope: "templates:read",
  request: {},
  reply: { status: 200, description: "All quantities", schema: QuantityPage },
  refusals: [],
  etag: true,
  examples: {
    success: {
      summary: "One of them",
      reply: {
        items: [
          {
            name: "thermal conductivity",
            kind: "plain",
            unit: "W/(m·K)",
            units: [
              { unit: "W/(m·K)", ucum: "W/(m.K)" },
              { unit: "BTU/(h·ft·°F)", ucum: "[Btu_IT]/(h.[ft_i].[degR])" },
            ],
          },
        ],
        nextCursor: null,
      },
    },
    failure: noQuery,
  },
});

export const listFunctions = operation({
  id: "listFunctions",
  method: "GET",
  path: "/functions",
  summary: "List functions and constants",
  description: "What a working may call: functions, special forms and constants, with help and sources.",
  tag,
  scope: "templates:read",
  request: {},
  reply: { status: 200, description: "All functions and constants", schema: FunctionPage },
  refusals: [],
  etag: true,
  examples: {
    success: {
      summary: "One of each",
      reply: {
        items: [
          { name: "sqrt", kind: "function", parameters: ["x"], variadic: false, help: "Square root." },
          {
            name: "integral",
            kind: "special form",
            parameters: ["x", "lo", "hi", "expr"],
            variadic: false,
            help: "Integral of expr over x from lo to hi.",
          },
        ],
        constants: [
          {
            name: "T_ice",
            value: 273.15,
            unit: "K",
            help: "Ice point, 0 °C, an absolute temperature",
            source: "ISO 80000-5",
          },
        ],
        nextCursor: null,
      },
    },
    failure: noQuery,
  },
});

export const getOpenApiDocument = operation({
  id: "getOpenApiDocument",
  method: "GET",
  path: "/openapi.json",
  summary: "Read this document",
  description: "OpenAPI 3.1 of all operations. Open to everybody.",
  tag,
  scope: "public",
  request: {},
  reply: { status: 200, description: "The document", schema: z.looseObject({ openapi: z.string() }) },
  refusals: [],
  etag: true,
  examples: {
    success: { summary: "The document", reply: { openapi: "3.1.1" } },
    failure: noQuery,
  },
});
