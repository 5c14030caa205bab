import type { Locator, Page } from "playwright-core";
import { beforeAll, expect, it } from "vitest";
import { scopes } from "@/db/vocabulary";
import { makeKeyOf, makePerson } from "../factories/people";
import { field, hasRun, mailOf, passwordOf, phone, desk, shown, signIn, site, soon } from "./browser";

/** The first thing a new user does: from signing in to a record, and the same call over REST. */

const coldface = site();
let key = "";

beforeAll(async () => {
  const owner = await makePerson({ role: "engineer" });
  key = (await makeKeyOf(owner, { scopes: [...scopes] })).key;
});

const title = "Pipe with layers and surface coefficients";

/** The texts of the projected view: temperatures of its faces and dimensions of its layers. */
const labelsOf = (page: Page) =>
  page
    .getByRole("img", { name: /^Section through 2 layers/ })
    .locator("text")
    .allTextContents();

const row = (page: Page, symbol: string) =>
  page
    .getByRole("region", { name: "Working" })
    .getByRole("listitem")
    .filter({ has: page.getByRole("group", { name: `Formula of ${symbol}`, exact: true }) });

/** Keeps what the form holds and answers the number of the record, whose page is then open. */
async function numberOfOpenRecord(page: Page): Promise<string> {
  await page.waitForURL(/\/records\/R-\d{6}$/);
  return page.url().split("/").at(-1) ?? "";
}

/** The record and a fresh call with the same inputs, both over REST: every double is the same. */
async function expectSameDigits(number: string) {
  const record = (await coldface.server.call("GET", `/records/${number}`, { key })).json;
  const call = await coldface.server.call("POST", "/templates/insulated-pipe/evaluate", {
    key,
    body: { inputs: { D_in: { value: 3, unit: "in" }, T_fluid: { value: 480, unit: "°F" } } },
  });
  expect(call.status).toBe(200);
  expect(call.json.results).toEqual(record.results);
  expect(Object.keys(record.results as object).length).toBeGreaterThan(5);
}

for (const [name, size] of [
  ["a desk", desk],
  ["a phone", phone],
] as const) {
  it(`leads from signing in to a record on ${name}, and over REST to the same digits`, async () => {
    await coldface.visit({ size }, async (page) => {
      await signIn(page, "engineer");
      await page.getByRole("searchbox", { name: "Find a calculation" }).fill("pipe layers");
      await page.keyboard.press("Enter");
      await page.waitForURL(/search=/);
      await page.getByRole("link", { name: title }).click();
      await page.getByRole("heading", { level: 1, name: title }).waitFor();
      await hasRun(page);

      const before = { surface: await shown(page, "Surface temperature"), labels: await labelsOf(page) };
      const bore = field(page, "Bore");
      const fluid = field(page, "Fluid temperature");
      await bore.fill("3 in");
      await fluid.fill("480 °F");
      await fluid.blur();
      await soon(() => bore.inputValue()).toBe("3");
      expect(await page.getByLabel("Unit of Bore").inputValue()).toBe("in");
      expect(await fluid.inputValue()).toBe("480");
      expect(await page.getByLabel("Unit of Fluid temperature").inputValue()).toBe("°F");

      await hasRun(page);
      await soon(() => shown(page, "Surface temperature")).not.toBe(before.surface);
      const surface = await shown(page, "Surface temperature");
      await soon(async () => (await labelsOf(page)).includes(`${surface} °C`)).toBe(true);
      expect(before.labels).not.toContain(`${surface} °C`);

      // The working shows every line with its value and unit.
      const line = /([\d.]+)\s*°C/.exec(await row(page, "T_surface").innerText());
      expect(Math.abs(Number(line?.[1]) - Number(surface))).toBeLessThan(0.01);
      expect(await row(page, "q_l").innerText()).toMatch(/\d\s*W\/m/);
      expect(await row(page, "D_outer").innerText()).toMatch(/86\.200\s+186\.20\s+mm/);
      const limits = page.getByRole("listitem").filter({ hasText: "inputs are untouched defaults" });
      expect(await limits.innerText()).not.toMatch(/Bore|Fluid temperature/);

      await page.getByRole("button", { name: "Keep record" }).click();
      const dialog = page.getByRole("dialog", { name: "Keep this run as a record" });
      await dialog.getByLabel("Title").fill(`Condensate line, ${name}`);
      await dialog.getByLabel("Tags").fill("P-1401, steam");
      await dialog.getByRole("button", { name: "Keep record" }).click();
      const number = await numberOfOpenRecord(page);
      await page.getByRole("heading", { level: 1, name: number }).waitFor();
      expect(await page.getByRole("heading", { level: 1 }).innerText()).toContain(`Condensate line, ${name}`);
      expect(await page.getByRole("link", { name: "P-1401" }).isVisible()).toBe(true);
      const kept = page.getByRole("region", { name: "Inputs" });
      expect(await kept.innerText()).toMatch(/3 in\s+typed/);
      expect(await kept.innerText()).toMatch(/480 °F\s+typed/);
      expect(await shown(page, "Surface temperature")).toBe(surface);

      await page.getByRole("button", { name: "Run again" }).click();
      await page.getByText("Same digits in every result.").waitFor();
      await expectSameDigits(number);
    });
  });
}

it("goes the same way by keyboard alone, with a mark wherever the focus is", async () => {
  await coldface.visit({}, async (page) => {
    await page.goto("/sign-in");
    await tabTo(page, page.getByLabel("Mail address"));
    await page.keyboard.type(mailOf("engineer"));
    await tabTo(page, page.getByLabel("Password"));
    await page.keyboard.type(passwordOf("engineer"));
    await page.keyboard.press("Enter");
    await page.waitForURL((address) => address.pathname === "/");

    await page.keyboard.press("/");
    await page.keyboard.type("pipe layers");
    await page.keyboard.press("Enter");
    await page.waitForURL(/search=/);
    const link = page.getByRole("link", { name: title });
    await link.waitFor();
    await tabTo(page, link);
    await page.keyboard.press("Enter");
    await page.getByRole("heading", { level: 1, name: title }).waitFor();
    await hasRun(page);
    const before = await shown(page, "Surface temperature");

    await tabTo(page, field(page, "Fluid temperature"));
    await replace(page, "480 °F");
    await tabTo(page, field(page, "Bore"));
    await replace(page, "3 in");
    await page.keyboard.press("Tab");
    await soon(() => page.getByLabel("Unit of Bore").inputValue()).toBe("in");
    await soon(() => shown(page, "Surface temperature")).not.toBe(before);
    await hasRun(page);

    const keep = page.getByRole("button", { name: "Keep record" });
    await tabTo(page, keep, "Shift+Tab");
    await page.keyboard.press("Enter");
    const dialog = page.getByRole("dialog", { name: "Keep this run as a record" });
    await tabTo(page, dialog.getByLabel("Title"));
    await page.keyboard.type("By keyboard");
    await tabTo(page, dialog.getByLabel("Tags"));
    await page.keyboard.type("P-1402");
    await page.keyboard.press("Enter");
    const number = await numberOfOpenRecord(page);
    await page.getByRole("heading", { level: 1, name: number }).waitFor();

    await tabTo(page, page.getByRole("button", { name: "Run again" }));
    await page.keyboard.press("Enter");
    await page.getByText("Same digits in every result.").waitFor();
    await page.keyboard.press("Escape");
    await soon(() => isFocused(page.getByRole("button", { name: "Run again" }))).toBe(true);
    await expectSameDigits(number);
  });
});

const isFocused = (target: Locator) => target.evaluate((element) => element === document.activeElement);

/** Presses Tab until the target has the focus; wherever it stops on the way, the focus must be seen. */
async function tabTo(page: Page, target: Locator, with_: "Tab" | "Shift+Tab" = "Tab"): Promise<void> {
  await target.waitFor();
  for (let presses = 0; presses < 150; presses++) {
    if (await isFocused(target)) return;
    await page.keyboard.press(with_);
    const unmarked = await page.evaluate(() => {
      const here = document.activeElement;
      if (!here || here === document.body) return null;
      const marked = [here, here.parentElement].some(
        (element) => element && getComputedStyle(element).outlineStyle !== "none",
      );
      return marked ? null : here.outerHTML.slice(0, 200);
    });
    expect(unmarked, "an element takes the focus without showing it").toBeNull();
  }
  throw new Error(`Tab never reached ${String(target)}.`);
}

async function replace(page: Page, text: string): Promise<void> {
  await page.keyboard.press("Control+A");
  await page.keyboard.type(text);
}
