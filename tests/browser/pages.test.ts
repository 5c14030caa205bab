import type { Page } from "playwright-core";
import { beforeAll, describe, expect, it } from "vitest";
import { makeKeyOf, makePerson } from "../factories/people";
import {
  axeFaults,
  phone,
  faultOf,
  field,
  hasRun,
  openTemplate,
  site,
  soon,
  type DemoPerson,
} from "./browser";

interface Place {
  readonly name: string;
  readonly address: string;
  readonly as?: DemoPerson;
  /** The answer is a refusal. */
  readonly status?: number;
  readonly ready?: (page: Page) => Promise<unknown>;
  /** Markup of a foreign viewer, whose faults are not ours to mend. */
  readonly foreign?: string;
}

const engineer = "engineer";

const places: readonly Place[] = [
  { name: "sign-in", address: "/sign-in" },
  { name: "home", address: "/", as: engineer },
  { name: "templates", address: "/templates", as: engineer },
  { name: "templates without a find", address: "/templates?search=nothing-like-it", as: engineer },
  { name: "a template with a section", address: "/templates/insulated-pipe", as: engineer, ready: hasRun },
  {
    name: "a template with materials in its table",
    address: "/templates/furnace-lining",
    as: engineer,
    ready: hasRun,
  },
  { name: "a template with a wide table", address: "/templates/device-stack", as: engineer, ready: hasRun },
  { name: "a template with a choice", address: "/templates/thick-body-step", as: engineer, ready: hasRun },
  { name: "a revision", address: "/templates/cold-strut/revisions/1", as: engineer, ready: hasRun },
  { name: "materials", address: "/materials", as: engineer },
  { name: "a material", address: "/materials/stone-wool-mat", as: engineer },
  { name: "records", address: "/records", as: engineer },
  { name: "a record", address: "/records/R-000001", as: engineer },
  { name: "a record that was declared void", address: "/records/R-000002", as: engineer },
  { name: "interfaces", address: "/interfaces", as: engineer },
  {
    name: "the reference",
    address: "/interfaces/reference",
    as: engineer,
    foreign: ".swagger-ui",
    ready: (page) => page.getByText("/templates/{slug}/evaluate", { exact: true }).first().waitFor(),
  },
  { name: "a problem", address: "/problems/unit-mismatch" },
  { name: "an unknown template", address: "/templates/no-such-thing", as: engineer, status: 404 },
  { name: "an address of nothing", address: "/nothing/here", as: engineer, status: 404 },
];

/** Everything that opens over a page: where, what opens it, and what is then there. */
const windows = [
  ["/templates/insulated-pipe", "Keep record", "dialog"],
  ["/templates/insulated-pipe", "As a call", "dialog"],
  ["/templates/insulated-pipe", "Paste from a table", "dialog"],
  ["/templates/insulated-pipe", /^Account of/, "menu"],
  ["/records/R-000001", "Run again", "dialog"],
] as const;

const coldface = site();

beforeAll(async () => {
  const owner = await makePerson({ role: "engineer" });
  const { key } = await makeKeyOf(owner, { scopes: ["runs:evaluate", "records:write", "records:read"] });
  const keep = (slug: string, body: object) =>
    coldface.server.call("POST", `/templates/${slug}/records`, { key, body });
  await keep("furnace-lining", {
    title: "Crown, winter campaign",
    tags: ["F-1", "crown"],
    note: "As built.",
  });
  const { json } = await keep("insulated-pipe", {
    title: "A long title that somebody typed for a long pipe bridge",
  });
  await coldface.server.call("POST", `/records/${String(json.number)}/void`, {
    key,
    body: { reason: "Entered for the wrong line." },
  });
});

/** At a desk and on a phone, light and dark: nothing for axe to find, nothing to scroll sideways for. */
async function expectClean(page: Page, options: { foreign?: string; within?: string } = {}): Promise<void> {
  expect(await axeFaults(page, options)).toEqual([]);
  const light = await groundOf(page);
  await page.emulateMedia({ colorScheme: "dark" });
  await soon(() => groundOf(page)).not.toBe(light);
  expect(await axeFaults(page, { ...options, colours: true })).toEqual([]);
  await page.setViewportSize(phone);
  await soon(() => overflow(page)).toBe(0);
  expect(await axeFaults(page, options)).toEqual([]);
  expect(await smallTargets(page, options.foreign)).toEqual([]);
  await page.emulateMedia({ colorScheme: "light" });
  await soon(() => groundOf(page)).toBe(light);
  expect(await axeFaults(page, { ...options, colours: true })).toEqual([]);
  await page.setViewportSize({ ...phone, width: 360 });
  await soon(() => overflow(page)).toBe(0);
}

describe("at 1440 px and 390 px, light and dark", () => {
  it.each(places)("$name is clean", async ({ address, as, status = 200, ready, foreign }) => {
    await coldface.visit({ as, refusals: [status] }, async (page) => {
      const reply = await page.goto(address);
      expect(reply?.status()).toBe(status);
      await page.getByRole("heading", { level: 1 }).waitFor();
      await ready?.(page);
      await expectClean(page, { foreign });
    });
  });

  it.each(windows)(
    "on %s the window of %s is clean, and Escape gives the focus back",
    async (address, name, role) => {
      await coldface.visit({ as: engineer }, async (page) => {
        await page.goto(address);
        const opener = page.getByRole("button", { name, exact: true });
        await soon(() => opener.isEnabled()).toBe(true);
        await opener.click();
        await page.getByRole(role).waitFor();
        await expectClean(page, { within: `[role=${role}]` });
        await page.keyboard.press("Escape");
        await page.getByRole(role).waitFor({ state: "detached" });
        expect(await opener.evaluate((element) => element === document.activeElement)).toBe(true);
      });
    },
  );

  it("the places of the site are in a menu on a phone", async () => {
    await coldface.visit({ as: engineer, size: phone }, async (page) => {
      await page.goto("/");
      await page.getByRole("button", { name: "Menu" }).click();
      expect(await axeFaults(page, { within: "[role=menu]" })).toEqual([]);
      await page.getByRole("menuitem", { name: "Materials" }).click();
      await page.waitForURL(/\/materials$/);
    });
  });

  it("a page stays readable while its run waits for a field", async () => {
    await coldface.visit({ as: engineer }, async (page) => {
      await openTemplate(page, "insulated-pipe");
      await field(page, "Bore").fill("about fifty");
      await field(page, "Radial thickness, row 1").fill("thin");
      await soon(() => faultOf(field(page, "Bore"))).not.toBe("");
      await expectClean(page);
    });
  });
});

const groundOf = (page: Page) => page.evaluate(() => getComputedStyle(document.body).backgroundColor);

const overflow = (page: Page) =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

/** Controls that a thumb would miss: less than 44 px high, links inside running text aside. */
function smallTargets(page: Page, foreign?: string): Promise<string[]> {
  return page.evaluate((outside) => {
    const found: string[] = [];
    for (const element of document.querySelectorAll<HTMLElement>(
      "button, input, select, textarea, summary, nav a",
    )) {
      if (outside !== undefined && element.closest(outside)) continue;
      const { width, height } = element.getBoundingClientRect();
      if (width <= 1 || height === 0 || element.closest("[aria-label='Where this is']")) continue;
      if (height < 43.5 || width < 43.5)
        found.push(`${Math.round(width)} x ${Math.round(height)}: ${element.outerHTML.slice(0, 160)}`);
    }
    return found;
  }, foreign);
}
