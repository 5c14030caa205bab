import { OpenAPIRegistry, OpenApiGeneratorV31 } from "@asteasolutions/zod-to-openapi";
import { scopes } from "@/db/vocabulary";
import { apiBase, paths } from "@/lib/core/paths";
import { errorCodes, type ErrorCode } from "@/lib/core/errors";
import { Problem } from "@/lib/core/problem";
import type { Operation } from "@/lib/http/operation";
import { nameSchemas } from "./components";
import { headerDocuments, idempotencyHeader } from "./headers";
import { operations } from "./index";

/** The OpenAPI document from the operation records. */

export type OpenApiDocument = ReturnType<OpenApiGeneratorV31["generateDocument"]>;

const tags = [
  { name: "Templates", description: "Issued calculations: what they ask and answer." },
  { name: "Runs", description: "Evaluate a template; nothing is kept." },
  { name: "Records", description: "Runs that are kept with everything needed to repeat them." },
  { name: "Definitions", description: "Definitions that are not saved; for seniors." },
  { name: "Materials", description: "Properties with source, valid range and limits of use." },
  { name: "Units and functions", description: "What values may be written in, and what a working may call." },
];

const intro = `Bodies are JSON (UTF-8) of at most 1 MB; duplicate members, lone surrogates and numbers beyond a double are refused. A refusal is a problem document (RFC 9457) that lists every problem of the request at once. Lists are \`{ items, nextCursor }\`. Single resources carry a strong ETag.`;

let built: OpenApiDocument | undefined;

/** The document for a server at \`publicUrl\`; built once. */
export function openApiDocument(publicUrl: string): OpenApiDocument {
  built ??= build();
  return { ...built, servers: [{ url: `${publicUrl}${apiBase}` }] };
}

function build(): OpenApiDocument {
  nameSchemas();
  const registry = new OpenAPIRegistry();
  const key = registry.registerComponent("securitySchemes", "key", {
    type: "http",
    scheme: "bearer",
    description: `An API key, \`cfk_…\`. Scopes: ${scopes.join(", ")}.`,
  });
  const session = registry.registerComponent("securitySchemes", "session", {
    type: "apiKey",
    in: "cookie",
    name: "session",
    description: "The session cookie of a signed-in person, same origin only.",
  });
  for (const [name, header] of Object.entries(headerDocuments)) {
    registry.registerComponent("headers", name, header);
  }
  for (const operation of operations) registry.registerPath(pathOf(operation, key.name, session.name));
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: "3.1.1",
    info: {
      title: "Coldface",
      version: "1.0.0",
      description: `Vetted heat-conduction calculations over REST. ${intro}`,
      license: { name: "Proprietary", identifier: "LicenseRef-Proprietary" },
    },
    servers: [{ url: apiBase }],
    tags,
  });
}

type PathConfig = Parameters<OpenAPIRegistry["registerPath"]>[0];

function pathOf(operation: Operation, key: string, session: string): PathConfig {
  const { params, query, body, bodyOptional } = operation.request;
  const { success } = operation.examples;
  return {
    method: operation.method.toLowerCase() as Lowercase<Operation["method"]>,
    path: operation.path,
    operationId: operation.id,
    summary: operation.summary,
    description: describedWithScope(operation),
    tags: [operation.tag],
    security: securityOf(operation, key, session),
    request: {
      ...(params === undefined ? {} : { params }),
      ...(query === undefined ? {} : { query }),
      ...(operation.idempotent === true ? { headers: idempotencyHeader } : {}),
      ...(body === undefined
        ? {}
        : {
            body: {
              required: bodyOptional !== true,
              content: {
                "application/json": {
                  schema: body,
                  examples: { success: { summary: success.summary, value: success.body } },
                },
              },
            },
          }),
    },
    responses: responsesOf(operation),
  };
}

function describedWithScope(operation: Operation): string {
  if (operation.scope === "public") return operation.description;
  if (operation.scope === "session") return `${operation.description} For signed-in people only.`;
  return `${operation.description} Keys need the scope \`${operation.scope}\`.`;
}

function securityOf(operation: Operation, key: string, session: string): Record<string, string[]>[] {
  if (operation.scope === "public") return [];
  if (operation.scope === "session") return [{ [session]: [] }];
  return [{ [key]: [] }, { [session]: [] }];
}

function responsesOf(operation: Operation): PathConfig["responses"] {
  const { reply, etag, examples } = operation;
  const headers = headersOf(operation);
  const responses: PathConfig["responses"] = {
    [reply.status]: {
      description: reply.description,
      headers,
      content: {
        "application/json": {
          schema: reply.schema,
          examples: { success: { summary: examples.success.summary, value: examples.success.reply } },
        },
      },
    },
  };
  if (etag === true) responses[304] = { description: "Not changed since the ETag sent as If-None-Match" };
  for (const [status, codes] of Object.entries(refusalsByStatus(operation))) {
    const shown = codes.includes(examples.failure.code);
    responses[status] = {
      description: codes.map((code) => `\`${code}\`: ${errorCodes[code].title}`).join(". "),
      headers: { "X-Request-Id": { $ref: "#/components/headers/X-Request-Id" } },
      content: {
        "application/problem+json": {
          schema: Problem,
          ...(shown
            ? {
                examples: {
                  failure: { summary: examples.failure.summary, value: failureDocument(operation) },
                },
              }
            : {}),
        },
      },
    };
  }
  return responses;
}

/** The problem document of an operation's example of failure. */
export function failureDocument(operation: Operation): Problem {
  const { code, detail, errors } = operation.examples.failure;
  return Problem.parse({
    type: `http://localhost:3000${paths.problem(code)}`,
    title: errorCodes[code].title,
    status: errorCodes[code].status,
    detail,
    instance: "0b7c4f2e-9a1d-4c5b-8e9f-1a3c5d7e9f0b",
    ...(errors === undefined ? {} : { errors }),
  });
}

/** Codes that an operation may answer: its own and the ones that follow from its parts. */
export function refusalsOf(operation: Operation): ErrorCode[] {
  const { params, query, body } = operation.request;
  const codes = new Set<ErrorCode>(operation.refusals);
  if (operation.scope !== "public") {
    for (const code of ["unauthenticated", "insufficient-scope", "forbidden", "too-many-requests"] as const) {
      codes.add(code);
    }
  }
  if (params !== undefined) codes.add("not-found");
  if (query !== undefined) for (const code of ["invalid-input", "out-of-range"] as const) codes.add(code);
  codes.add("unknown-member");
  if (body !== undefined) {
    for (const code of [
      "malformed-json",
      "too-large",
      "unsupported-type",
      "missing-input",
      "invalid-input",
      "out-of-range",
    ] as const) {
      codes.add(code);
    }
  }
  if (operation.idempotent === true) {
    for (const code of ["still-running", "idempotency-key-reused"] as const) codes.add(code);
  }
  for (const code of ["internal", "busy"] as const) codes.add(code);
  return [...codes];
}

function refusalsByStatus(operation: Operation): Record<string, ErrorCode[]> {
  const byStatus: Record<string, ErrorCode[]> = {};
  for (const code of refusalsOf(operation)) (byStatus[errorCodes[code].status] ??= []).push(code);
  return byStatus;
}

function headersOf(operation: Operation): Record<string, { $ref: string }> {
  const names = [
    "X-Request-Id",
    "Link",
    ...(operation.scope === "public" ? [] : ["RateLimit-Policy", "RateLimit"]),
    ...(operation.etag === true ? ["ETag"] : []),
    ...(operation.reply.headers ?? []),
  ];
  return Object.fromEntries(names.map((name) => [name, { $ref: `#/components/headers/${name}` }]));
}
