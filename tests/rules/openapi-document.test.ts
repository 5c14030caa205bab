import { readFileSync } from "node:fs";
import Ajv2020 from "ajv/dist/2020";
import addFormats from "ajv-formats";
import { describe, expect, it } from "vitest";
import { scopes } from "@/db/vocabulary";
import { errorCodes } from "@/lib/core/errors";
import { failureDocument, openApiDocument, refusalsOf } from "@/openapi/document";
import { operations } from "@/openapi/index";

type Json = Record<string, unknown>;
const document = JSON.parse(JSON.stringify(openApiDocument("http://localhost:3000"))) as Json & {
  paths: Record<string, Record<string, Json>>;
  components: { schemas: Record<string, Json> };
};

/** The whole document as one schema resource, so that `#/components/…` references resolve. */
const ajv = addFormats(new Ajv2020({ strict: false, allErrors: true }));
ajv.addSchema(document, "document");

function validate(pointer: string, value: unknown): unknown[] {
  const check = ajv.compile({ $ref: `document#${pointer}` });
  return check(value)
    ? []
    : (check.errors ?? []).map(({ instancePath, message, params }) => ({ instancePath, message, params }));
}

const escaped = (path: string) => path.replace(/~/g, "~0").replace(/\//g, "~1");
const pathPointer = (operation: (typeof operations)[number]) =>
  `/paths/${encodeURIComponent(escaped(operation.path))}/${operation.method.toLowerCase()}`;

describe("the OpenAPI document", () => {
  it("is the committed one", () => {
    expect(JSON.parse(readFileSync("openapi/openapi.json", "utf8"))).toEqual(document);
  });

  it("declares 3.1.1 and compiles as JSON Schema 2020-12", () => {
    expect(document.openapi).toBe("3.1.1");
    for (const name of Object.keys(document.components.schemas)) {
      expect(() => ajv.compile({ $ref: `document#/components/schemas/${name}` }), name).not.toThrow();
    }
  });

  it.each(operations.map((operation) => [operation.id, operation] as const))(
    "%s shows a success and a failure that its schemas accept",
    (_id, operation) => {
      const { success, failure } = operation.examples;
      const content = encodeURIComponent(escaped("application/json"));
      const at = pathPointer(operation);
      if (operation.request.body !== undefined) {
        expect(validate(`${at}/requestBody/content/${content}/schema`, success.body)).toEqual([]);
      }
      expect(
        validate(`${at}/responses/${operation.reply.status}/content/${content}/schema`, success.reply),
      ).toEqual([]);
      expect(operation.request.params?.safeParse(success.params ?? {}).success ?? true).toBe(true);
      expect(operation.request.query?.safeParse(success.query ?? {}).success ?? true).toBe(true);
      expect(refusalsOf(operation)).toContain(failure.code);
      const problem = encodeURIComponent(escaped("application/problem+json"));
      const status = errorCodes[failure.code].status;
      expect(
        validate(`${at}/responses/${status}/content/${problem}/schema`, failureDocument(operation)),
      ).toEqual([]);
    },
  );

  it("gives each operation one tag that is described, and a scope that exists", () => {
    const described = (document.tags as { name: string }[]).map((tag) => tag.name);
    const known: string[] = ["public", "session", ...scopes];
    for (const operation of operations) {
      expect(described).toContain(operation.tag);
      expect(known).toContain(operation.scope);
      expect(document.paths[operation.path]?.[operation.method.toLowerCase()]?.tags).toHaveLength(1);
    }
  });

  it("closes every object of a request and limits every text, list and whole number", () => {
    const faults: string[] = [];
    const seen = new Set<string>();
    const visit = (node: unknown, at: string): void => {
      if (Array.isArray(node)) return node.forEach((item, index) => visit(item, `${at}/${index}`));
      if (typeof node !== "object" || node === null) return;
      const schema = node as Json;
      if (typeof schema.$ref === "string") {
        const name = schema.$ref.split("/").at(-1) ?? "";
        if (!seen.has(name)) {
          seen.add(name);
          visit(document.components.schemas[name], name);
        }
        return;
      }
      if (schema.type === "object" && schema.additionalProperties === undefined) faults.push(`${at} is open`);
      if (schema.type === "string" && schema.enum === undefined) {
        const bounded =
          schema.maxLength !== undefined || schema.pattern !== undefined || schema.format !== undefined;
        if (!bounded) faults.push(`${at} is a text without a limit`);
      }
      if (schema.type === "array" && schema.maxItems === undefined && schema.prefixItems === undefined) {
        faults.push(`${at} is a list without a limit`);
      }
      for (const [name, member] of Object.entries(schema)) visit(member, `${at}/${name}`);
    };
    for (const operation of operations) {
      const entry = document.paths[operation.path]?.[operation.method.toLowerCase()] as Json;
      const body = (entry.requestBody as { content: Record<string, { schema: unknown }> } | undefined)
        ?.content;
      if (body) visit(body["application/json"]?.schema, `${operation.id} body`);
      for (const parameter of (entry.parameters ?? []) as { name: string; schema: unknown }[]) {
        visit(parameter.schema, `${operation.id} ${parameter.name}`);
      }
    }
    expect(faults).toEqual([]);
  });

  it("writes every nullable member so that null is accepted", () => {
    expect(validate("/components/schemas/TemplateItem/properties/issuedBy", null)).toEqual([]);
    expect(validate("/components/schemas/RecordView/properties/void", null)).toEqual([]);
    expect(validate("/components/schemas/RevisionSummary/properties/checkedBy", null)).toEqual([]);
  });
});
