import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { GivenInputs } from "@/lib/calculation/evaluation";
import { evaluate, type Prepared } from "@/lib/calculation/execute";
import { compatibleUnits, fromSi, parseUnit, quantityByName, toSi } from "@/lib/units";
import { preparedTemplate, suppliedMaterials } from "./calculation-fixtures";

/** Templates whose results are smooth in every input: no solver tolerance beside the conversion's rounding. */
const closedForms = [
  "plane-wall",
  "pipe-wall",
  "insulated-pipe",
  "spherical-shell",
  "linear-k-wall",
  "composite-wall",
  "straight-fin",
  "annular-fin",
  "generating-wall",
  "buried-pipe",
  "thick-body-step",
  "lumped-cooldown",
].map((slug) => [slug, preparedTemplate(slug)] as const);

function inUnit(value: number, declared: string, wanted: string, quantityName: string): number {
  const quantity = quantityByName(quantityName)!;
  const [from, to] = [declared, wanted].map((text) => parseUnit(text, { expect: quantity }));
  if (!from!.ok || !to!.ok) throw new Error(`${declared}, ${wanted}`);
  return fromSi(toSi(value, from!.value, quantity.kind), to!.value, quantity.kind);
}

/** Every number input at its default, each in a unit that `pick` chooses among those of its quantity. */
function inputsIn(prepared: Prepared, pick: (count: number) => number): GivenInputs {
  const inputs: GivenInputs = {};
  for (const input of prepared.definition.inputs) {
    if (input.kind !== "number" || input.default === undefined) continue;
    const units = compatibleUnits(quantityByName(input.quantity)!);
    const unit = units[pick(units.length)]!;
    inputs[input.symbol] = { value: inUnit(input.default, input.unit, unit, input.quantity), unit };
  }
  return inputs;
}

/**
 * Size that an error is measured by. A temperature near 0 °C carries the rounding of its kelvins, and what is
 * calculated from a difference of temperatures that of both.
 */
function close(actual: number, expected: number, scale: number): boolean {
  return Math.abs(actual - expected) <= 1e-12 * Math.max(Math.abs(expected), scale);
}

describe("units never change a result", () => {
  it.each(closedForms)("%s: inputs in any compatible units", (_, prepared) => {
    const base = evaluate(prepared, {}, suppliedMaterials);
    fc.assert(
      fc.property(fc.array(fc.nat(1000), { minLength: 40, maxLength: 40 }), (draws) => {
        let next = 0;
        const inputs = inputsIn(prepared, (count) => draws[next++ % draws.length]! % count);
        const run = evaluate(prepared, { inputs }, suppliedMaterials);
        for (const [symbol, { value, quantity }] of Object.entries(base.results)) {
          if (value === undefined) continue;
          const found = run.results[symbol]?.value ?? NaN;
          const scale = quantityByName(quantity)?.kind === "absolute" ? 300 : Math.abs(value) * 10;
          expect(
            close(found, value, scale),
            `${symbol}: ${found} for ${value} with ${JSON.stringify(inputs)}`,
          ).toBe(true);
        }
      }),
      { numRuns: 60 },
    );
  });

  it.each(closedForms)("%s: results in any compatible unit are the same quantity", (_, prepared) => {
    const base = evaluate(prepared, {}, suppliedMaterials);
    for (const { symbol, quantity } of prepared.definition.results) {
      const result = base.results[symbol];
      if (result?.value === undefined) continue;
      for (const unit of compatibleUnits(quantityByName(quantity)!)) {
        const asked = evaluate(prepared, { units: { [symbol]: unit } }, suppliedMaterials).results[symbol]!;
        const back = inUnit(asked.value!, unit, result.unit, quantity);
        const scale = quantityByName(quantity)?.kind === "absolute" ? 300 : 0;
        expect(close(back, result.value, scale), `${symbol} in ${unit}`).toBe(true);
      }
    }
  });

  it("gives UCUM codes that read back as the same unit", () => {
    const prepared = preparedTemplate("plane-wall");
    const run = evaluate(
      prepared,
      { inputs: { k: { value: 0.3, unit: "BTU.in/(h.ft2.degF)" } }, units: { Q: "BTU/h" } },
      {},
    );
    const used = run.inputs.k;
    if (!used || !("si" in used)) throw new Error("k is no number");
    const again = evaluate(prepared, { inputs: { k: { value: 0.3, unit: used.ucum! } } }, {});
    expect(again.inputs.k).toMatchObject({ si: used.si });
  });
});
