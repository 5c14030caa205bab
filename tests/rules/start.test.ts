import { describe, expect, it } from "vitest";
import { passwordProblem } from "@/lib/access/password";
import { clientAddress } from "@/lib/access/client-address";
import { boundHost, refuseExposedDemo } from "@/lib/access/installation";
import { readEnv } from "@/lib/core/env";
import { newId } from "@/lib/core/ids";
import { testSettings } from "../factories/database";

const settings = testSettings("data/test.db");

describe("the settings of an installation", () => {
  it("have the defaults of a private machine", () => {
    expect(readEnv({ ...settings, PUBLIC_URL: "" })).toMatchObject({
      HOST: "127.0.0.1",
      PORT: 3000,
      PUBLIC_URL: "http://localhost:3000",
      SEED: "demo",
      ALLOW_DEMO: false,
      TRUSTED_PROXIES: 0,
    });
  });

  it.each(["AUTH_SECRET", "KEY_SECRET", "AUDIT_SECRET"])("stop the start without %s", (name) => {
    expect(() => readEnv({ ...settings, [name]: undefined })).toThrow(`${name} is missing`);
    expect(() => readEnv({ ...settings, [name]: "short" })).toThrow(`${name} is too short`);
  });

  it("name everything that is wrong at once", () => {
    expect(() => readEnv({ ...settings, PORT: "many", SEED: "other", PUBLIC_URL: "ftp://x" })).toThrow(
      /PUBLIC_URL[^]*PORT[^]*SEED/,
    );
  });
});

describe("a demo database", () => {
  const host =
    (HOST: string, ALLOW_DEMO = false) =>
    () =>
      refuseExposedDemo({ HOST, ALLOW_DEMO }, { demo: true });

  it.each(["127.0.0.1", "localhost", "::1", "127.1.2.3"])("is served on %s", (name) => {
    expect(host(name)).not.toThrow();
  });

  it.each(["0.0.0.0", "::", "192.168.1.4", "works.example", "127.0.0.1.evil.example"])(
    "is not served on %s",
    (name) => {
      expect(host(name)).toThrow("whose passwords are published");
      expect(host(name, true)).not.toThrow();
      expect(() => refuseExposedDemo({ HOST: name, ALLOW_DEMO: false }, { demo: false })).not.toThrow();
    },
  );
});

describe("the address that is bound", () => {
  const served = { HOST: "127.0.0.1", NODE_ENV: "production" };

  it("is that of the command line, and every one when there is none", () => {
    expect(boundHost(["node", "next", "start", "--hostname", "0.0.0.0"], served)).toBe("0.0.0.0");
    expect(boundHost(["node", "next", "start", "--hostname=10.0.0.1"], served)).toBe("10.0.0.1");
    expect(boundHost(["node", "next", "start", "-H", "localhost"], served)).toBe("localhost");
    expect(boundHost(["node", "next", "start"], served)).toBe("::");
    expect(boundHost(["node", "start-server.js"], { ...served, NODE_ENV: "development" })).toBe("127.0.0.1");
  });
});

describe("a new password", () => {
  const about = { email: "erika.lindqvist@works.example", name: "Erika Lindqvist" };

  it.each([
    "lagging kettle orbit spruce",
    "Grünkohl mit Pinkel 1",
    "aaaa bbbb cccc dddd eeee",
    "密码密码安全第一高炉热风炉保温层",
  ])("may be %s", (password) => {
    expect(passwordProblem(password, about)).toBeNull();
  });

  it.each([
    ["fourteen chars", /14 characters/],
    ["x".repeat(300), /At most 256/],
    ["Password-Password-1", /lists that attackers try/],
    ["correct horse battery staple", /lists that attackers try/],
    ["tarn-bridge-engineer", /lists that attackers try/],
    ["aaaaaaaaaaaaaaaaaa", /very few characters/],
    ["lagging.lagging.lagging", /repeats one short piece/],
    ["qwertyuiopasdfghjkl", /a run along/],
    ["zyxwvutsrqponmlkjih", /a run along/],
    ["0123456789012345", /a run along/],
    ["erika lindqvist 2026", /little more than your name/],
    ["coldface-coldface-1", /little more than/],
  ])("may not be %.30s", (password, words) => {
    expect(passwordProblem(password, about)).toMatch(words);
  });
});

describe("the caller's address", () => {
  const headers = new Headers({ "x-forwarded-for": "6.6.6.6, 203.0.113.9, 10.0.0.2" });

  it("is what the declared proxies say, never what the caller wrote", () => {
    expect(clientAddress(headers, 0)).toBeNull();
    expect(clientAddress(headers, 1)).toBe("10.0.0.2");
    expect(clientAddress(headers, 2)).toBe("203.0.113.9");
    expect(clientAddress(headers, 9)).toBeNull();
    expect(clientAddress(new Headers(), 1)).toBeNull();
  });
});

describe("ids", () => {
  it("are unique and sort by age", async () => {
    const first = newId("rec");
    await new Promise((resolve) => setTimeout(resolve, 3));
    const second = newId("rec");
    expect(first).toMatch(/^rec_[0-9a-hjkmnp-tv-z]{26}$/);
    expect(first < second).toBe(true);
    expect(new Set(Array.from({ length: 1000 }, () => newId("x"))).size).toBe(1000);
  });
});
