import type { Page } from "playwright-core";
import { beforeAll, describe, expect, it } from "vitest";
import { issueNext, issueTemplate, layerDefinition, withdraw } from "../factories/definitions";
import { faultOf, field, hasRun, openTemplate, results, shown, site, soon } from "./browser";

/** What the form does with what cannot be run: a sentence at the field, the text stays, and it mends. */

const coldface = site();

const heading = (page: Page) => page.getByRole("heading", { name: /^Results/ });
const keep = (page: Page) => page.getByRole("button", { name: "Keep record" });

describe("a field", () => {
  it.each([
    ["8 furlongs/K", /“?furlongs|length/],
    ["8 kg", /kg does not measure length/],
    ["1,250", /1,250/],
    ["", /^Bore is empty\. Type a number/],
    ["about fifty", /about fifty/],
    ["1e999", /too large|largest|finite/i],
    ["infinity", /infinity/i],
    ["0", /^Bore is 0 mm\. It must be greater than 0\./],
    ["-3 in", /^Bore is −3 in\. It must be greater than 0\./],
  ])("says what is wrong with %j, keeps the text and recovers", async (text, sentence) => {
    await coldface.visit({ as: "engineer", refusals: [422] }, async (page) => {
      await openTemplate(page, "insulated-pipe");
      const bore = field(page, "Bore");
      const before = await shown(page, "Surface temperature");
      await bore.fill(text);
      await soon(() => faultOf(bore)).toMatch(sentence);
      await bore.blur();
      expect(await bore.inputValue()).toBe(text === "-3 in" ? "-3" : text);
      expect(await heading(page).innerText()).toContain("waiting for: Bore");
      expect(await results(page).locator("caption").textContent()).toContain(
        "of the last run that could be done",
      );
      expect(await shown(page, "Surface temperature")).toBe(before);
      expect(await keep(page).isDisabled()).toBe(true);

      await bore.fill("60 mm");
      await soon(() => faultOf(bore)).toBe("");
      await hasRun(page);
      await soon(() => heading(page).innerText()).toBe("Results");
      await soon(() => keep(page).isEnabled()).toBe(true);
      expect(await shown(page, "Surface temperature")).not.toBe(before);
    });
  });

  it.each([
    ["insulated-pipe", "Fluid temperature", "-300", /^Fluid temperature is −300 °C\. .*absolute zero/, "200"],
    ["pipe-wall", "Outside diameter", "40", /outside diameter must be above the inside diameter/, "70"],
  ])("of %s: %s refuses %s", async (slug, label, text, sentence, mended) => {
    await coldface.visit({ as: "engineer", refusals: [422] }, async (page) => {
      await openTemplate(page, slug);
      const target = field(page, label);
      await target.fill(text);
      await soon(() => faultOf(target)).toMatch(sentence);
      expect(await target.inputValue()).toBe(text);
      expect(await heading(page).innerText()).toMatch(/waiting/);
      await target.fill(mended);
      await soon(() => faultOf(target)).toBe("");
      await hasRun(page);
      await soon(() => heading(page).innerText()).toBe("Results");
    });
  });

  it("says at the material that a temperature lies outside its data", async () => {
    await coldface.visit({ as: "engineer", refusals: [422] }, async (page) => {
      await openTemplate(page, "cold-strut");
      const cold = field(page, "Temperature of the cold end");
      const material = page.getByRole("combobox", { name: "Material of the strut" });
      await cold.fill("0.5");
      await soon(() => faultOf(material)).toMatch(/asked at 0\.5 K\. It is valid from 1 K to 300 K/);
      expect(await heading(page).innerText()).toMatch(/waiting/);
      await cold.fill("4.2");
      await soon(() => faultOf(material)).toBe("");
      await hasRun(page);
    });
  });

  it("says in which row of a table a number is wrong, at its cell", async () => {
    await coldface.visit({ as: "engineer", refusals: [422] }, async (page) => {
      await openTemplate(page, "insulated-pipe");
      const cell = field(page, "Radial thickness, row 2");
      for (const [text, sentence] of [
        ["0", "Row 2: Radial thickness is 0 mm. It must be greater than 0."],
        ["", /^Row 2: Radial thickness is empty/],
        ["fifty", /^Row 2: .*fifty/],
      ] as const) {
        await cell.fill(text);
        await soon(() => faultOf(cell)).toMatch(sentence);
        expect(await cell.inputValue()).toBe(text);
        expect(await faultOf(field(page, "Radial thickness, row 1"))).toBe("");
      }
      await cell.fill("2 in");
      await soon(() => faultOf(cell)).toBe("");
      await cell.blur();
      await soon(() => cell.inputValue()).toBe("50.8");
    });
  });

  it("tells of a material that is not known", async () => {
    await coldface.visit({ as: "engineer", refusals: [422] }, async (page) => {
      await openTemplate(page, "furnace-lining");
      await page.getByRole("button", { name: "Paste from a table" }).click();
      await page.getByLabel("Rows", { exact: true }).fill("Lining\t114\tunobtainium");
      await page.getByRole("button", { name: "Fill the table" }).click();
      const cell = page.getByRole("combobox", { name: "Material, row 1", exact: true });
      await soon(() => faultOf(cell)).toBe("Row 1: Material: there is no material “unobtainium”.");
      expect(await cell.inputValue()).toBe("unobtainium");
    });
  });
});

it("says that the connection is lost, keeps what was typed, and goes on when it is back", async () => {
  await coldface.visit({ as: "engineer", loses: "connection" }, async (page) => {
    await openTemplate(page, "insulated-pipe");
    const before = await shown(page, "Surface temperature");
    await page.context().setOffline(true);
    await field(page, "Fluid temperature").fill("300");
    const said = page.getByRole("alert").filter({ hasText: "The server did not answer." });
    await said.waitFor();
    expect(await heading(page).innerText()).toMatch(/waiting/);
    expect(await field(page, "Fluid temperature").inputValue()).toBe("300");
    expect(await shown(page, "Surface temperature")).toBe(before);
    await page.context().setOffline(false);
    await said.waitFor({ state: "detached" });
    await hasRun(page);
    expect(await shown(page, "Surface temperature")).not.toBe(before);
  });
});

describe("an address", () => {
  let withdrawn = "";
  let superseded = "";

  beforeAll(async () => {
    const wall = await issueTemplate(layerDefinition());
    await withdraw(wall.revisionId, "The factor of the second layer was wrong.");
    withdrawn = wall.slug;
    const roof = await issueTemplate(layerDefinition());
    await issueNext(roof, layerDefinition());
    superseded = roof.slug;
  });

  it.each([
    "/templates/no-such-thing",
    "/templates/insulated-pipe/revisions/99",
    "/templates/insulated-pipe/revisions/one",
    "/materials/unobtainium",
    "/records/R-999999",
    "/records/17",
    "/problems/no-such-code",
  ])("of nothing says so and leads on: %s", async (address) => {
    await coldface.visit({ as: "engineer", refusals: [404] }, async (page) => {
      const reply = await page.goto(address);
      expect(reply?.status()).toBe(404);
      await page.getByRole("heading", { level: 1, name: "Nothing is here" }).waitFor();
      await page.getByRole("link", { name: "To the home page" }).click();
      await page.waitForURL((url) => url.pathname === "/");
    });
  });

  it("of a withdrawn revision tells the reason and offers no run", async () => {
    await coldface.visit({ as: "engineer" }, async (page) => {
      await page.goto(`/templates/${withdrawn}`);
      await page.getByText("The factor of the second layer was wrong.").waitFor();
      expect(await keep(page).count()).toBe(0);
      expect(await page.getByRole("form", { name: "Inputs" }).count()).toBe(0);
      expect(await page.getByText("Withdrawn, revision 1").isVisible()).toBe(true);
    });
  });

  it("of a superseded revision still runs and says what it is", async () => {
    await coldface.visit({ as: "engineer" }, async (page) => {
      await page.goto(`/templates/${superseded}/revisions/1`);
      await hasRun(page);
      expect(await page.getByText("Superseded, revision 1").isVisible()).toBe(true);
    });
  });

  it("with a filter that makes no sense shows the list without it", async () => {
    await coldface.visit({ as: "engineer" }, async (page) => {
      await page.goto("/templates?category=poetry&limit=x&cursor=%00");
      await page.getByRole("link", { name: /^Pipe with layers/ }).waitFor();
    });
  });
});
