import { describe, expect, it } from "vitest";
import { RunRequest } from "@/lib/calculation/evaluation";
import { problemsFromZod } from "@/lib/http/zod-problems";
import { CreateRecordBody, ListRecordsQuery } from "@/lib/records/schemas";
import type { z } from "zod";

function problems(schema: z.ZodType, value: unknown) {
  const parsed = schema.safeParse(value);
  if (parsed.success) throw new Error("The value was accepted.");
  return problemsFromZod(parsed.error, schema, value).map(({ path: _path, ...problem }) => problem);
}

describe("faults of a request's shape", () => {
  it("are told all at once, in sentences, each at its place", () => {
    const found = problems(CreateRecordBody, {
      input: {},
      accept: [],
      steps: "yes",
      tags: ["a", 5],
      title: "x".repeat(200),
    });
    expect(found.map(({ pointer, code }) => [pointer, code])).toEqual([
      ["#/steps", "invalid-input"],
      ["#/accept", "out-of-range"],
      ["#/tags/1", "invalid-input"],
      ["#/title", "out-of-range"],
      ["#/input", "unknown-member"],
    ]);
    for (const { message } of found) expect(message).toMatch(/^[“A-Z].*[.?]$/);
  });

  it("name the nearest known member", () => {
    expect(problems(RunRequest, { inpts: {} })[0]).toMatchObject({
      code: "unknown-member",
      expected: "inputs",
      message: "“inpts” is not known here. Did you mean “inputs”?",
    });
    expect(problems(RunRequest, { inputs: { t: { value: 1, unti: "mm" } } })[0]).toMatchObject({
      pointer: "#/inputs/t/unti",
      expected: "unit",
    });
  });

  it("list what is known when nothing is near", () => {
    expect(problems(RunRequest, { zzzzzzzz: 1 })[0]?.message).toContain("Known are inputs, units");
  });

  it("say what a value may be when its kind fits none", () => {
    expect(problems(RunRequest, { inputs: { t: true } })[0]).toMatchObject({
      pointer: "#/inputs/t",
      code: "invalid-input",
      message: "“t” must be a number, a text, an object, a list or null.",
      received: true,
    });
  });

  it("report the faults of the kind of value that was meant", () => {
    expect(problems(RunRequest, { inputs: { t: { value: "8", unit: "in" } } })[0]).toMatchObject({
      pointer: "#/inputs/t/value",
      message: "“value” must be a number.",
      received: "8",
    });
    expect(problems(RunRequest, { inputs: { t: { unit: "in" } } })[0]).toMatchObject({
      pointer: "#/inputs/t/value",
      code: "missing-input",
    });
  });

  it("name the nearest option of a closed list", () => {
    expect(problems(ListRecordsQuery, { status: "stopp" })[0]?.message).toBe(
      "“status” must be ok, caution or stop. Did you mean “stop”?",
    );
  });

  it("escape a pointer as RFC 6901 in a URI fragment", () => {
    expect(problems(RunRequest, { "a/b~c d": 1 })[0]?.pointer).toBe("#/a~1b~0c%20d");
  });
});
