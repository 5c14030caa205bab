import { execFile } from "node:child_process";
import { promisify } from "node:util";
import type { Locator, Page } from "playwright-core";
import { beforeAll, describe, expect, it } from "vitest";
import { makeKeyOf, makePerson } from "../factories/people";
import { field, hasRun, openTemplate, phone, results, shown, site, soon } from "./browser";

/** Rows of a table, units that convert, materials and constants, and the run as a call that a shell makes. */

const coldface = site();
let key = "";

beforeAll(async () => {
  const owner = await makePerson({ role: "engineer" });
  key = (await makeKeyOf(owner, { scopes: ["runs:evaluate"] })).key;
});

const rows = (page: Page) =>
  page
    .getByRole("group", { name: "Layers, hot face first" })
    .getByRole("row")
    .filter({ has: page.getByRole("textbox") });

/** The rows as they stand in the form. */
const cells = async (page: Page) =>
  rows(page).evaluateAll((all) =>
    all.map((row) =>
      [...row.querySelectorAll<HTMLInputElement | HTMLSelectElement>("input, select")].map(
        (cell) => cell.value,
      ),
    ),
  );

const button = (page: Page, name: string) => page.getByRole("button", { name, exact: true });
const isFocused = (target: Locator) => target.evaluate((element) => element === document.activeElement);

const [hot, middle, mat] = [
  ["Hot face brick", "114", "fireclay-brick"],
  ["Insulating brick", "114", "insulating-brick-23"],
  ["Backing mat", "25", "stone-wool-mat"],
];

/** Three rows as a spreadsheet copies them. */
const block =
  "Dense brick\t230\tfireclay-brick\nInsulating brick\t4.5 in\tinsulating-brick-23\nBoard\t50\t0.08 W/(m·K)\n";
const pasted = [
  ["Dense brick", "230", "fireclay-brick"],
  ["Insulating brick", "4.5 in", "insulating-brick-23"],
  ["Board", "50", ":constant", "0.08 W/(m·K)"],
];

describe("rows", () => {
  for (const [name, size] of [
    ["a desk", undefined],
    ["a phone", phone],
  ] as const) {
    it(`are added, moved and removed on ${name}, and the focus goes with them`, async () => {
      await coldface.visit({ as: "engineer", size, refusals: [422] }, async (page) => {
        await openTemplate(page, "furnace-lining");
        expect(await cells(page)).toEqual([hot, middle, mat]);
        await button(page, "Move row 3 up").click();
        expect(await cells(page)).toEqual([hot, mat, middle]);
        expect(await isFocused(button(page, "Move row 2 up"))).toBe(true);
        await page.keyboard.press("Enter");
        expect(await cells(page)).toEqual([mat, hot, middle]);
        expect(await isFocused(button(page, "Move row 1 down"))).toBe(true);
        await button(page, "Move row 1 down").click();
        await button(page, "Remove row 2").click();
        expect(await cells(page)).toEqual([hot, middle]);
        expect(await isFocused(button(page, "Remove row 2"))).toBe(true);
        await hasRun(page);

        await button(page, "Add a row").click();
        expect(await isFocused(field(page, "Name, row 3"))).toBe(true);
        await page.keyboard.type("Plaster");
        await field(page, "Thickness, row 3").fill("1 in");
        await field(page, "Thickness, row 3").blur();
        await page
          .getByRole("combobox", { name: "Material, row 3", exact: true })
          .selectOption("stone-wool-mat");
        await soon(() => cells(page)).toEqual([hot, middle, ["Plaster", "25.4", "stone-wool-mat"]]);
        await hasRun(page);
        await page.getByRole("img", { name: /^Section through 3 layers/ }).waitFor();
      });
    });
  }

  it("are pasted into the grid from a spreadsheet", async () => {
    await coldface.visit({ as: "engineer" }, async (page) => {
      await page.context().grantPermissions(["clipboard-read", "clipboard-write"]);
      await openTemplate(page, "furnace-lining");
      await page.evaluate((text) => navigator.clipboard.writeText(text), block);
      await field(page, "Name, row 2").focus();
      await page.keyboard.press("Control+V");
      expect(await cells(page)).toEqual([hot, ...pasted]);
      await hasRun(page);
      await page.getByRole("img", { name: /^Section through 4 layers/ }).waitFor();
    });
  });

  it("are pasted through the window for them", async () => {
    await coldface.visit({ as: "engineer" }, async (page) => {
      await openTemplate(page, "furnace-lining");
      const before = await shown(page, "Shell temperature");
      await button(page, "Paste from a table").click();
      const dialog = page.getByRole("dialog", { name: "Paste rows" });
      expect(await dialog.innerText()).toContain("columns in this order: Name, Thickness, Material");
      await dialog.getByLabel("Rows").fill(block);
      await button(page, "Fill the table").click();
      await soon(() => cells(page)).toEqual(pasted);
      await hasRun(page);
      await soon(() => shown(page, "Shell temperature")).not.toBe(before);
      await button(page, "Back to defaults").click();
      await soon(() => shown(page, "Shell temperature")).toBe(before);
    });
  });
});

describe("units", () => {
  it("of a column convert its cells and nothing of the run", async () => {
    await coldface.visit({ as: "engineer" }, async (page) => {
      await openTemplate(page, "furnace-lining");
      const before = await shown(page, "Shell temperature");
      await page.getByLabel("Unit of Thickness").selectOption("in");
      expect((await cells(page)).map((row) => Number(row[1]).toFixed(4))).toEqual([
        "4.4882",
        "4.4882",
        "0.9843",
      ]);
      await hasRun(page);
      expect(await shown(page, "Shell temperature")).toBe(before);
      await page.getByLabel("Unit of Thickness").selectOption("mm");
      expect((await cells(page)).map((row) => row[1])).toEqual(["114", "114", "25"]);
    });
  });

  it("of a result convert what is shown", async () => {
    await coldface.visit({ as: "engineer" }, async (page) => {
      await openTemplate(page, "insulated-pipe");
      const celsius = Number(await shown(page, "Surface temperature"));
      await page.getByLabel("Unit of Surface temperature", { exact: true }).selectOption("°F");
      await soon(async () => Number(await shown(page, "Surface temperature"))).toBeCloseTo(
        celsius * 1.8 + 32,
        1,
      );
      expect(await page.getByLabel("Unit of Surface temperature", { exact: true }).inputValue()).toBe("°F");
    });
  });
});

it("takes a constant in place of a material, with its unit", async () => {
  await coldface.visit({ as: "engineer", refusals: [422] }, async (page) => {
    await openTemplate(page, "furnace-lining");
    const before = await shown(page, "Shell temperature");
    await page
      .getByRole("combobox", { name: "Material, row 3", exact: true })
      .selectOption({ label: "a constant, typed" });
    const constant = field(page, "Material, row 3, constant value with unit");
    await constant.fill("0.05 W/(m·K)");
    await hasRun(page);
    const metric = await shown(page, "Shell temperature");
    expect(metric).not.toBe(before);
    // 0.05 W/(m·K) is 0.347 BTU·in/(h·ft²·°F), ASTM C168 units.
    await constant.fill("0.34667 BTU·in/(h·ft²·°F)");
    await hasRun(page);
    expect(await shown(page, "Shell temperature")).toBe(metric);
  });
});

it("gives the run as a call that a shell makes, with the same digits", async () => {
  await coldface.visit({ as: "engineer" }, async (page) => {
    let answered: { results?: unknown } = {};
    page.on("response", (reply) => {
      if (/\/revisions\/1\/evaluate$/.test(reply.url()))
        void reply.json().then((json) => (answered = json as object));
    });
    await openTemplate(page, "furnace-lining");
    await field(page, "Name, row 1").fill('Maker\'s brick; $(id) `id` "A"');
    await field(page, "Hot-face temperature").fill("1900 °F");
    await page.getByLabel("Unit of Shell temperature").selectOption("°F");
    await hasRun(page);
    await button(page, "As a call").click();
    const dialog = page.getByRole("dialog", { name: "The same run over REST" });
    const curl = await dialog.getByLabel("curl", { exact: true }).innerText();
    expect(curl).toContain('"unit": "°F"');
    const { stdout } = await promisify(execFile)("bash", ["-c", curl], {
      env: { ...process.env, COLDFACE_KEY: key },
    });
    const reply = JSON.parse(stdout) as {
      results: unknown;
      inputs: { layers: { rows: { name: { text: string } }[] } };
    };
    expect(reply.results).toEqual(answered.results);
    expect(reply.inputs.layers.rows[0]?.name.text).toBe('Maker\'s brick; $(id) `id` "A"');
    expect(await results(page).count()).toBe(1);
  });
});
