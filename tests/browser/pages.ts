import type { Page } from "playwright-core";
import { beforeAll, describe, expect, it } from "vitest";
import { makeKeyOf, makePerson } from "../factories/people";
import { axeFaults, faultOf, field, hasRun, openTemplate, site, soon, type DemoPerson } from "./browser";

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

/** The tests of every page at one size: light, dark, narrow, read out, and quiet. */
export function describePages(size: { width: number; height: number }, narrower?: number): void {
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

  describe.each(places)("$name", ({ address, as, status = 200, ready, foreign }) => {
    it(`is clean at ${size.width} px, light and dark`, async () => {
      await coldface.visit({ as, size, refusals: [status] }, async (page) => {
        const reply = await page.goto(address);
        expect(reply?.status()).toBe(status);
        await page.getByRole("heading", { level: 1 }).waitFor();
        await ready?.(page);
        expect(await axeFaults(page, { foreign })).toEqual([]);
        const light = await groundOf(page);
        await page.emulateMedia({ colorScheme: "dark" });
        await soon(() => groundOf(page)).not.toBe(light);
        expect(await axeFaults(page, { foreign, colours: true })).toEqual([]);
        for (const width of narrower === undefined ? [size.width] : [size.width, narrower]) {
          await page.setViewportSize({ ...size, width });
          if (foreign === undefined) await soon(() => overflow(page)).toBe(0);
        }
        if (size.width < 760) expect(await smallTargets(page, foreign)).toEqual([]);
      });
    });
  });

  it.each(windows)(
    "on %s: %s opens a clean window, and Escape gives the focus back",
    async (address, name, role) => {
      await coldface.visit({ as: engineer, size }, async (page) => {
        await page.goto(address);
        const opener = page.getByRole("button", { name, exact: true });
        await soon(() => opener.isEnabled()).toBe(true);
        await opener.click();
        await page.getByRole(role).waitFor();
        expect(await axeFaults(page, { within: `[role=${role}]` })).toEqual([]);
        await page.emulateMedia({ colorScheme: "dark" });
        expect(await axeFaults(page, { within: `[role=${role}]`, colours: true })).toEqual([]);
        expect(await overflow(page)).toBe(0);
        await page.keyboard.press("Escape");
        await page.getByRole(role).waitFor({ state: "detached" });
        expect(await opener.evaluate((element) => element === document.activeElement)).toBe(true);
      });
    },
  );

  it("stays readable while a run waits for a field", async () => {
    await coldface.visit({ as: engineer, size }, async (page) => {
      await openTemplate(page, "insulated-pipe");
      await field(page, "Bore").fill("about fifty");
      await field(page, "Radial thickness, row 1").fill("thin");
      await soon(() => faultOf(field(page, "Bore"))).not.toBe("");
      expect(await axeFaults(page)).toEqual([]);
      await page.emulateMedia({ colorScheme: "dark" });
      expect(await axeFaults(page, { colours: true })).toEqual([]);
      expect(await overflow(page)).toBe(0);
    });
  });
}

/** Everything that opens over a page: where, what opens it, and what is then there. */
const windows = [
  ["/templates/insulated-pipe", "Keep record", "dialog"],
  ["/templates/insulated-pipe", "As a call", "dialog"],
  ["/templates/insulated-pipe", "Paste from a table", "dialog"],
  ["/templates/insulated-pipe", /^Account of/, "menu"],
  ["/records/R-000001", "Run again", "dialog"],
] as const;

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
