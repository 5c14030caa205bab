import { describe, expect, it } from "vitest";
import { evaluate, prepare } from "@/lib/calculation/execute";
import { safetyNotices } from "@/lib/calculation/safety";
import { preparedTemplate, suppliedMaterials, suppliedSlugs, wall } from "./calculation-fixtures";

const codes = (celsius: number) =>
  safetyNotices("shapes", celsius + 273.15, celsius + 273.15).map(({ code }) => code.replace("safety-", ""));

describe("safety texts", () => {
  it.each([
    [60, []],
    [60.1, ["contact-burns"]],
    [20, []],
    [0, []],
    [-0.1, ["cold-contact"]],
    [-20, ["cold-contact"]],
    [-20.5, ["cold-contact", "embrittlement"]],
    [91 - 273.15, ["cold-contact", "embrittlement"]],
    [90.9 - 273.15, ["cold-contact", "embrittlement", "oxygen"]],
  ])("at %f °C are %j and the standing sentence", (celsius, expected) => {
    expect(codes(celsius)).toEqual([...expected, "local-codes"]);
  });

  it("count temperatures of inputs and of results, in whatever unit they were given", () => {
    const prepared = prepare(wall());
    const found = (inputs: Record<string, { value: number; unit: string }>) =>
      evaluate(prepared, { inputs }, {}).notices.map(({ code }) => code);
    const cool = { T_hot: { value: 140, unit: "°F" }, T_cold: { value: 32, unit: "°F" } };
    expect(found(cool)).toEqual(["local-codes"]);
    expect(found({ ...cool, T_hot: { value: 141, unit: "°F" } })).toContain("safety-contact-burns");
    expect(found({ ...cool, T_cold: { value: 4, unit: "K" } })).toContain("safety-oxygen");
  });

  it("never say that anything is safe, and close every supplied template with the standing sentence", () => {
    for (const slug of suppliedSlugs) {
      const run = evaluate(preparedTemplate(slug), {}, suppliedMaterials);
      const words = [
        ...run.notices.map(({ message }) => message),
        ...run.cautions.map(({ message }) => message),
        ...run.limits.flatMap(({ label, message }) => [label, message ?? ""]),
      ].join(" ");
      expect(words, slug).not.toMatch(/\bsafe(ly|ty)?\b/i);
      expect(run.notices.at(-1)?.code, slug).toBe("local-codes");
    }
  });
});
