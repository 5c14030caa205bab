import { describe, expect, it } from "vitest";
import { authOptions } from "@/lib/people/auth-options";
import { testSettings } from "../factories/database";

Object.assign(process.env, testSettings("data/unused.db"), { PUBLIC_URL: "https://calc.works.example" });

describe("on https", () => {
  it("every cookie of the sign-in is bound to this host, a secure connection and path /", () => {
    const { cookies, useSecureCookies } = authOptions();
    expect(useSecureCookies).toBe(true);
    for (const cookie of [cookies?.sessionToken, cookies?.csrfToken, cookies?.callbackUrl]) {
      expect(cookie?.name).toMatch(/^__Host-coldface\./);
      expect(cookie?.options).toEqual({ httpOnly: true, sameSite: "lax", path: "/", secure: true });
    }
  });
});
