import { describe, expect, it } from "vitest";
import { getMaterial, getMaterialRevision } from "@/lib/materials/get-material";
import { getPropertyValue } from "@/lib/materials/get-property-value";
import { listMaterials } from "@/lib/materials/list-materials";
import { ListMaterialsQuery } from "@/lib/materials/schemas";
import { materialSnapshots } from "@/lib/materials/snapshots";
import { testDatabase } from "../factories/database";
import { issueMaterial, issueNextMaterial, lineMaterial } from "../factories/definitions";
import { personActor } from "../factories/people";

testDatabase();
const reader = personActor("reader");

describe("a property at a temperature", () => {
  const value = async (query: Record<string, string>, name = "k") => {
    const { slug } = await issueMaterial();
    return getPropertyValue(reader, { slug, name, T: "500", ...query });
  };

  it("is read in the units asked for", async () => {
    // k = 1 + T/1000: 1.5 W/(m·K) at 500 K.
    expect(await value({})).toMatchObject({ value: 1.5, unit: "W/(m·K)", T: { value: 500, unit: "K" } });
    expect((await value({ T: "226.85", unit: "°C" })).value).toBeCloseTo(1.5, 12);
    expect((await value({ T: "440.33 °F" })).value).toBeCloseTo(1.5, 12);
    // 1 BTU/(h·ft·°F) = 1.730734666 W/(m·K), NIST SP 811.
    expect((await value({ in: "BTU/(h·ft·°F)" })).value).toBeCloseTo(1.5 / 1.730734666, 8);
  });

  it("is a mean when a second temperature is given", async () => {
    expect((await value({ T: "200", to: "400" })).value).toBeCloseTo(1.3, 10);
  });

  it("refuses a temperature outside its data unless extrapolation is allowed, which is told", async () => {
    await expect(value({ T: "1200" })).rejects.toMatchObject({
      problems: [{ pointer: "#/query/T", code: "outside-validity" }],
    });
    expect((await value({ T: "1200", allowExtrapolation: "true" })).cautions).toMatchObject([
      { code: "extrapolation" },
    ]);
  });

  it("tells every fault of the question at once", async () => {
    await expect(value({ T: "warm", to: "-5", unit: "kg", in: "K" })).rejects.toMatchObject({
      problems: [
        { pointer: "#/query/unit", code: "unit-mismatch" },
        { pointer: "#/query/in", code: "unit-mismatch" },
        { pointer: "#/query/T", code: "invalid-input" },
      ],
    });
    await expect(value({ T: "-5" })).rejects.toMatchObject({ problems: [{ code: "out-of-range" }] });
  });

  it("is not there for a property that the material does not have", async () => {
    await expect(value({}, "rho")).rejects.toMatchObject({ code: "not-found" });
    await expect(value({}, "colour")).rejects.toMatchObject({ code: "not-found" });
  });
});

describe("materials", () => {
  it("are listed with the valid range of each property", async () => {
    const { slug } = await issueMaterial();
    const page = await listMaterials(reader, ListMaterialsQuery.parse({ search: slug, class: "refractory" }));
    expect(page.items).toMatchObject([
      { slug, properties: { k: { min: 0, max: 1000, argumentUnit: "K", unit: "W/(m·K)" } } },
    ]);
    expect(
      (await listMaterials(reader, ListMaterialsQuery.parse({ search: slug, class: "gas" }))).items,
    ).toEqual([]);
  });

  it("keep every revision readable, and a run by slug uses the issued one", async () => {
    const made = await issueMaterial();
    await issueNextMaterial(
      made,
      lineMaterial([
        [0, 10],
        [1000, 20],
      ]),
    );
    expect((await getMaterial(reader, made)).current.revision).toBe(2);
    expect(await getMaterialRevision(reader, { slug: made.slug, revision: 1 })).toMatchObject({
      state: "superseded",
    });
    const pinned = `${made.slug}@1`;
    const snapshots = await materialSnapshots([made.slug, pinned, "nothing", `${made.slug}@9`, "@", "a@b"]);
    expect(Object.entries(snapshots).map(([name, { revision }]) => [name, revision])).toEqual([
      [made.slug, 2],
      [pinned, 1],
    ]);
    expect(
      (await materialSnapshots([made.slug], [{ slug: made.slug, revision: 1 }]))[made.slug]?.revision,
    ).toBe(1);
  });
});
