import { existsSync } from "node:fs";
import AxeBuilder from "@axe-core/playwright";
import { chromium, type Browser, type BrowserContext, type Locator, type Page } from "playwright-core";
import { afterAll, beforeAll, expect } from "vitest";
import { apiServer, type ApiServer } from "../api/harness";

/** Real Chromium before the built application with the demo works, and ears for everything that goes wrong there. */

export const phone = { width: 390, height: 844 };
export const desk = { width: 1440, height: 900 };

export type DemoPerson = "admin" | "senior" | "checker" | "engineer" | "reader";

export interface VisitOptions {
  /** Who is signed in when the visit begins; nobody when left out. */
  readonly as?: DemoPerson;
  readonly size?: { width: number; height: number };
  readonly scheme?: "light" | "dark";
  /** Refusals that the visit provokes. The browser writes a line about each on its console, which is not held against the page. */
  readonly refusals?: readonly number[];
  /** The visit cuts the connection; failed requests are expected then. */
  readonly loses?: "connection";
}

export class Site {
  private browser: Browser | null = null;
  /** What the browser holds after signing in, by person, so that each signs in once for a test file. */
  private readonly states = new Map<DemoPerson, Awaited<ReturnType<BrowserContext["storageState"]>>>();

  constructor(readonly server: ApiServer) {}

  /** The address people use; sign-in and the rules on other sites know this one. */
  get url(): string {
    return process.env.PUBLIC_URL ?? "";
  }

  async launch(): Promise<void> {
    const executablePath = [process.env.CHROMIUM_PATH, "/usr/bin/chromium", "/usr/bin/chromium-browser"].find(
      (file) => file !== undefined && existsSync(file),
    );
    if (executablePath === undefined)
      throw new Error(
        "No Chromium was found. Install one (Debian: apt-get install chromium) or set CHROMIUM_PATH.",
      );
    this.browser = await chromium.launch({
      executablePath,
      args: ["--no-sandbox", "--disable-gpu", "--disable-background-networking"],
    });
  }

  async close(): Promise<void> {
    await this.browser?.close();
  }

  /** One window. It fails when its console shows an error, a policy is reported broken or a request leaves the host. */
  async visit(options: VisitOptions, work: (page: Page) => Promise<void>): Promise<void> {
    const { as, size = desk, scheme = "light" } = options;
    if (as !== undefined && !this.states.has(as)) {
      await this.visit({}, async (page) => {
        await signIn(page, as);
        this.states.set(as, await page.context().storageState());
      });
    }
    const context = await this.context({
      baseURL: this.url,
      viewport: size,
      colorScheme: scheme,
      ...(as === undefined ? {} : { storageState: this.states.get(as) }),
    });
    const faults = listen(context, this.url, options);
    try {
      await work(await context.newPage());
    } catch (error) {
      if (faults.length > 0 && error instanceof Error)
        error.message += `\nThe page also said:\n${faults.join("\n")}`;
      throw error;
    } finally {
      await context.close();
    }
    expect(faults).toEqual([]);
  }

  private async context(options: Parameters<Browser["newContext"]>[0]): Promise<BrowserContext> {
    if (!this.browser) throw new Error("The browser is not started.");
    const context = await this.browser.newContext(options);
    context.setDefaultTimeout(20_000);
    await context.addInitScript(() =>
      document.addEventListener("securitypolicyviolation", (event) =>
        console.error(`Policy broken: ${event.violatedDirective} by ${event.blockedURI || "inline"}`),
      ),
    );
    return context;
  }
}

function listen(context: BrowserContext, url: string, { refusals = [], loses }: VisitOptions): string[] {
  const faults: string[] = [];
  context.on("console", (message) => {
    if (message.type() !== "error" && message.type() !== "warning") return;
    const text = message.text();
    const network =
      /^Failed to load resource: (?:the server responded with a status of (\d+)|net::ERR_INTERNET)/.exec(
        text,
      );
    if (network?.[1] !== undefined && refusals.includes(Number(network[1]))) return;
    if (network && network[1] === undefined && loses === "connection") return;
    faults.push(`${message.type()}: ${text}`);
  });
  context.on("weberror", (fault) => faults.push(`uncaught: ${fault.error().message}`));
  context.on("request", (request) => {
    const asked = request.url();
    if (/^(data|blob):/.test(asked) || new URL(asked).origin === new URL(url).origin) return;
    faults.push(`A request left for ${asked}`);
  });
  context.on("response", (response) => {
    if (response.status() >= 500) faults.push(`${response.status()} from ${response.url()}`);
  });
  return faults;
}

/** A site for a test file: prepared and started before its tests, ended after them. */
export function site(): Site {
  const made = new Site(apiServer());
  beforeAll(() => made.launch(), 60_000);
  afterAll(() => made.close());
  return made;
}

export const mailOf = (who: DemoPerson) => `${who}@tarnbridge.example`;
export const passwordOf = (who: DemoPerson) => `tarn-bridge-${who}`;

/** Signs in through the page. */
export async function signIn(page: Page, who: DemoPerson): Promise<void> {
  await page.goto("/sign-in");
  await page.getByLabel("Mail address").fill(mailOf(who));
  await page.getByLabel("Password").fill(passwordOf(who));
  await page.getByRole("button", { name: "Sign in" }).click();
  await page.waitForURL((address) => address.pathname === "/");
}

/** What is read shall soon become what follows. */
export function soon<T>(read: () => Promise<T> | T) {
  return expect.poll(read, { timeout: 20_000, interval: 60 });
}

/** Opens a template and waits until its first run stands. */
export async function openTemplate(page: Page, slug: string): Promise<void> {
  await page.goto(`/templates/${slug}`);
  await hasRun(page);
}

/** Waits until the results belong to what the form holds. */
export async function hasRun(page: Page): Promise<void> {
  await page
    .locator('table[aria-busy="false"]')
    .filter({ has: page.getByRole("cell") })
    .first()
    .waitFor();
  await soon(() => results(page).getAttribute("aria-busy")).toBe("false");
}

export function results(page: Page): Locator {
  return page.getByRole("table", { name: /^Results/ });
}

/** The number that a result shows, as text. */
export async function shown(page: Page, label: string): Promise<string> {
  const row = results(page)
    .getByRole("row")
    .filter({ has: page.getByRole("rowheader", { name: label, exact: true }) });
  return (await row.locator("td.num").innerText()).replace(/\s+/g, " ").trim();
}

/** A field of the form by the name that it is read out with. */
export function field(page: Page, label: string): Locator {
  return page.getByRole("textbox", { name: label, exact: true });
}

/** The sentence that a field points at as its fault, as a screen reader would find it. */
export async function faultOf(field: Locator): Promise<string> {
  if ((await field.getAttribute("aria-invalid")) !== "true") return "";
  return field.evaluate((element) =>
    (element.getAttribute("aria-describedby") ?? "")
      .split(" ")
      .map((id) => document.getElementById(id)?.textContent ?? "")
      .join(" ")
      .trim(),
  );
}

interface AxeOptions {
  /** Selector of a foreign viewer: it is left out, with the second main that it brings. */
  readonly foreign?: string;
  /** Selector of the one part that is looked at. */
  readonly within?: string;
  /** Contrast alone, for what differs in nothing else from what was looked at before. */
  readonly colours?: boolean;
}

/** What axe finds against WCAG 2.2 AA, one line each. */
export async function axeFaults(page: Page, options: AxeOptions = {}): Promise<string[]> {
  // Without the option most of the time goes into naming the places of what is in order.
  const builder = new AxeBuilder({ page }).options({ resultTypes: ["violations"] });
  if (options.colours) builder.withRules("color-contrast");
  else builder.withTags(["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa", "best-practice"]);
  if (options.within !== undefined) builder.include(options.within);
  if (options.foreign !== undefined)
    builder.exclude(options.foreign).disableRules("landmark-no-duplicate-main");
  const { violations } = await builder.analyze();
  return violations.flatMap(({ id, help, nodes }) =>
    nodes.map((node) =>
      `${id}: ${help}: ${node.target.join(" ")} ${node.failureSummary ?? ""}`.slice(0, 400),
    ),
  );
}
