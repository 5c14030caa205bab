import type { Page } from "playwright-core";
import { describe, expect, it } from "vitest";
import {
  field,
  hasRun,
  mailOf,
  openTemplate,
  passwordOf,
  shown,
  signIn,
  site,
  soon,
  type DemoPerson,
} from "./browser";

/** Who may do what on the pages, and how one comes in and goes. */

const coldface = site();

/** Sends the sign-in form that is open. */
async function send(page: Page, mail: string, password: string): Promise<void> {
  await page.getByLabel("Mail address").fill(mail);
  await page.getByLabel("Password").fill(password);
  await page.getByRole("button", { name: "Sign in" }).click();
}

/** A call from the page itself, as its own code makes them: with the session, from the same site. */
const callFrom = (page: Page, path: string, body: object) =>
  page.evaluate(
    async ([address, text]) => {
      const reply = await fetch(address, {
        method: "POST",
        headers: { "content-type": "application/json" },
        body: text,
      });
      return { status: reply.status, json: (await reply.json()) as Record<string, unknown> };
    },
    [`/api/v1${path}`, JSON.stringify(body)] as const,
  );

/** A record of somebody's, kept through the interface; its number. */
async function keepAs(who: DemoPerson, body: object): Promise<string> {
  let number = "";
  await coldface.visit({ as: who }, async (page) => {
    await page.goto("/records");
    const made = await callFrom(page, "/templates/insulated-pipe/records", body);
    expect(made.status).toBe(201);
    number = String(made.json.number);
  });
  return number;
}

describe("signing in", () => {
  it("leads back to where one wanted to go", async () => {
    await coldface.visit({}, async (page) => {
      await page.goto("/templates/plane-wall?record=R-000001");
      await page.waitForURL(/\/sign-in\?callbackUrl=/);
      await send(page, mailOf("engineer"), passwordOf("engineer"));
      await page.waitForURL(/\/templates\/plane-wall\?record=R-000001$/);
      await page.getByRole("heading", { level: 1, name: "Plane wall, one layer" }).waitFor();
    });
  });

  it("leads to no other site", async () => {
    for (const wanted of [
      "https://elsewhere.example/",
      "//elsewhere.example/",
      "/\\elsewhere.example",
      "javascript:alert(1)",
    ])
      await coldface.visit({}, async (page) => {
        await page.goto(`/sign-in?callbackUrl=${encodeURIComponent(wanted)}`);
        await send(page, mailOf("engineer"), passwordOf("engineer"));
        await page.getByRole("heading", { name: "Recently used" }).waitFor();
        expect(new URL(page.url()).origin).toBe(coldface.url);
      });
  });

  it("says the same of a wrong password and of an unknown account, and lets one try again", async () => {
    await coldface.visit({ refusals: [401] }, async (page) => {
      await page.goto("/sign-in");
      const sentences: string[] = [];
      for (const mail of [mailOf("engineer"), "nobody@tarnbridge.example"]) {
        await send(page, mail, "not the password of anybody");
        await page.getByRole("button", { name: "Sign in", exact: true }).waitFor();
        sentences.push(await page.getByRole("alert").filter({ hasText: /\w/ }).innerText());
      }
      expect(sentences[0]).toMatch(/do not match/);
      expect(sentences[1]).toBe(sentences[0]);
      await send(page, mailOf("engineer"), passwordOf("engineer"));
      await page.waitForURL((url) => url.pathname === "/");
    });
  });

  it("ends with signing out, for a cookie taken before as well", async () => {
    await coldface.visit({}, async (page) => {
      await signIn(page, "engineer");
      const taken = await page.context().cookies();
      await page.getByRole("button", { name: /^Account of/ }).click();
      await page.getByRole("menuitem", { name: "Sign out" }).click();
      await page.waitForURL(/\/sign-in/);
      await page.context().addCookies(taken);
      await page.goto("/records");
      await page.waitForURL(/\/sign-in\?callbackUrl=/);
    });
  });
});

describe("a reader", () => {
  it("runs everything and keeps nothing", async () => {
    await coldface.visit({ as: "reader", refusals: [403] }, async (page) => {
      await openTemplate(page, "insulated-pipe");
      await field(page, "Bore").fill("80");
      await hasRun(page);
      expect(await page.getByRole("button", { name: "Keep record" }).count()).toBe(0);
      const refused = await callFrom(page, "/templates/insulated-pipe/records", {});
      expect(refused.status).toBe(403);
    });
  });

  it("sees a record and may not declare it void", async () => {
    const number = await keepAs("engineer", { title: "To be read" });
    await coldface.visit({ as: "reader", refusals: [403] }, async (page) => {
      await page.goto(`/records/${number}`);
      await page.getByRole("heading", { level: 1, name: number }).waitFor();
      expect(await page.getByRole("button", { name: "Declare void" }).count()).toBe(0);
      expect((await callFrom(page, `/records/${number}/void`, { reason: "Mine now." })).status).toBe(403);
      await page.getByRole("button", { name: "Run again" }).click();
      await page.getByText("Same digits in every result.").waitFor();
    });
  });
});

describe("a record", () => {
  it("is declared void with a reason, for good", async () => {
    const number = await keepAs("engineer", { title: "Wrong line" });
    await coldface.visit({ as: "engineer" }, async (page) => {
      await page.goto(`/records/${number}`);
      await page.getByRole("button", { name: "Declare void" }).click();
      const dialog = page.getByRole("dialog", { name: `Declare ${number} void` });
      const confirm = dialog.getByRole("button", { name: "Declare void" });
      expect(await confirm.isDisabled()).toBe(true);
      await dialog.getByLabel("Reason").fill("Entered for the wrong line.");
      await confirm.click();
      await page.getByText("Entered for the wrong line.").waitFor();
      await soon(() => page.getByRole("button", { name: "Declare void" }).count()).toBe(0);
      await page.goto("/records");
      expect(await page.getByRole("row").filter({ hasText: number }).innerText()).toMatch(/void/);
    });
  });

  it("is only its keeper's or a senior's to declare void", async () => {
    const number = await keepAs("senior", { title: "Of a senior" });
    await coldface.visit({ as: "engineer" }, async (page) => {
      await page.goto(`/records/${number}`);
      await page.getByRole("heading", { level: 1, name: number }).waitFor();
      expect(await page.getByRole("button", { name: "Declare void" }).count()).toBe(0);
    });
    const other = await keepAs("engineer", {});
    await coldface.visit({ as: "checker" }, async (page) => {
      await page.goto(`/records/${other}`);
      await page.getByRole("button", { name: "Declare void" }).waitFor();
    });
  });

  it("opens in the form with what it was given, and is found by its tag", async () => {
    const inputs = {
      D_in: { value: 4, unit: "in" },
      T_fluid: 210,
      layers: [{ name: "Foam", t: { value: 2, unit: "in" }, k: 0.03 }],
    };
    const number = await keepAs("engineer", { inputs, tags: ["P-77"] });
    await coldface.visit({ as: "engineer" }, async (page) => {
      await page.goto("/records?tag=P-77");
      await page.getByRole("link", { name: number }).click();
      await page.getByRole("link", { name: "Open in the form" }).click();
      await hasRun(page);
      expect(await field(page, "Bore").inputValue()).toBe("4");
      expect(await page.getByLabel("Unit of Bore").inputValue()).toBe("in");
      expect(await field(page, "Fluid temperature").inputValue()).toBe("210");
      expect(await field(page, "Name, row 1").inputValue()).toBe("Foam");
      expect(await field(page, "Radial thickness, row 1").inputValue()).toBe("2 in");
      const form = await shown(page, "Heat loss per length");
      await page.goto(`/records/${number}`);
      expect(await shown(page, "Heat loss per length")).toBe(form);
    });
  });
});

it("colours are as one chooses them, on this device", async () => {
  await coldface.visit({ as: "engineer" }, async (page) => {
    await page.goto("/");
    const ground = () => page.evaluate(() => getComputedStyle(document.body).backgroundColor);
    const light = await ground();
    await page.getByRole("button", { name: /^Account of/ }).click();
    await page.getByRole("menuitem", { name: "Dark, for control rooms" }).click();
    await soon(ground).not.toBe(light);
    await page.reload();
    expect(await ground()).not.toBe(light);
  });
});
