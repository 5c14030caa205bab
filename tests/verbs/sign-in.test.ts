import { eq } from "drizzle-orm";
import { encode } from "next-auth/jwt";
import { describe, expect, it } from "vitest";
import { reader } from "@/db/client";
import { audit } from "@/db/schema/system";
import { loginAttempts, sessions } from "@/db/schema/people";
import { write } from "@/db/tx";
import { actorFromRequest } from "@/lib/access/current-actor";
import { findSession } from "@/lib/access/sessions";
import { env } from "@/lib/core/env";
import { authOptions } from "@/lib/people/auth-options";
import { needsFirstPerson, setUpCode, setUpFirstPerson } from "@/lib/people/set-up-first-person";
import { signIn } from "@/lib/people/sign-in";
import { signOut } from "@/lib/people/sign-out";
import { testDatabase } from "../factories/database";
import { deactivate, goodPassword, makePerson } from "../factories/people";
import { unique } from "../factories/unique";

testDatabase();

const cookieOf = async (sessionId: string) =>
  `coldface.session=${await encode({ token: { sid: sessionId }, secret: env().AUTH_SECRET })}`;

const request = (cookie: string, init: RequestInit = {}) =>
  new Request("http://localhost:3000/api/v1/records", { ...init, headers: { cookie, ...init.headers } });

describe("the first person", () => {
  const wanted = () => ({
    code: setUpCode(),
    email: "First@Works.example",
    name: "First",
    password: goodPassword,
  });

  it("is refused with a wrong code and with a weak password", async () => {
    expect(await needsFirstPerson()).toBe(true);
    await expect(setUpFirstPerson({ ...wanted(), code: "AAAAA-AAAAA-AAAAA-AAAAA" })).rejects.toMatchObject({
      problems: [{ pointer: "#/code" }],
    });
    await expect(setUpFirstPerson({ ...wanted(), password: "too short" })).rejects.toMatchObject({
      problems: [{ pointer: "#/password" }],
    });
    expect(await needsFirstPerson()).toBe(true);
  });

  it("is made once, as senior and administrator, and signs in", async () => {
    const outcomes = await Promise.allSettled([setUpFirstPerson(wanted()), setUpFirstPerson(wanted())]);
    expect(outcomes.map((outcome) => outcome.status).sort()).toEqual(["fulfilled", "rejected"]);
    await expect(setUpFirstPerson({ ...wanted(), email: "second@works.example" })).rejects.toMatchObject({
      code: "state-conflict",
    });
    const actor = await signIn({ email: "FIRST@works.example ", password: goodPassword });
    expect(actor).toMatchObject({ role: "senior", isAdmin: true, email: "first@works.example" });
  });
});

describe("signing in", () => {
  it("answers unknown, wrong and deactivated with the same words", async () => {
    const active = await makePerson();
    const gone = await makePerson();
    await deactivate(gone.personId);
    const refusals = await Promise.all(
      [
        { email: "nobody@works.example", password: goodPassword },
        { email: active.email, password: "not the password at all" },
        { email: gone.email, password: goodPassword },
      ].map((input) => signIn(input).catch((error: unknown) => error)),
    );
    const told = refusals.map((error) => (error instanceof Error ? error.message : "signed in"));
    expect(new Set(told)).toEqual(new Set(["The address and the password do not belong together."]));
    expect(refusals).toEqual(refusals.map(() => expect.objectContaining({ code: "unauthenticated" })));
  });

  it("notes the sign-in in the trail", async () => {
    const person = await makePerson();
    await signIn({ email: person.email, password: goodPassword });
    const rows = await reader()
      .select()
      .from(audit)
      .where(eq(audit.object, `person:${person.personId}`));
    expect(rows.map((row) => row.action)).toEqual(["person.created", "person.signed-in"]);
  });

  it("refuses the eleventh attempt on an account in a quarter of an hour, right password or not", async () => {
    const person = await makePerson();
    const wrong = { email: person.email, password: "not the password at all" };
    const outcomes = await Promise.allSettled(Array.from({ length: 14 }, () => signIn(wrong)));
    const codes = outcomes.map((outcome) =>
      outcome.status === "rejected" ? outcome.reason.code : "signed in",
    );
    expect(codes.filter((code) => code === "unauthenticated")).toHaveLength(10);
    expect(codes.filter((code) => code === "too-many-requests")).toHaveLength(4);
    await expect(signIn({ email: person.email, password: goodPassword })).rejects.toMatchObject({
      code: "too-many-requests",
      extra: { retryAfter: expect.any(Number) },
    });
    const other = await makePerson();
    await expect(signIn({ email: other.email, password: goodPassword })).resolves.toBeTruthy();
  });

  it("throttles an unknown account like a known one", async () => {
    const email = `${unique("ghost")}@works.example`;
    for (let n = 0; n < 10; n += 1) {
      await expect(signIn({ email, password: "x" })).rejects.toMatchObject({ code: "unauthenticated" });
    }
    await expect(signIn({ email, password: "x" })).rejects.toMatchObject({ code: "too-many-requests" });
  });

  it("lets an account try again after its attempts have aged, and forgets them after a success", async () => {
    const person = await makePerson();
    const wrong = { email: person.email, password: "not the password at all" };
    for (let n = 0; n < 10; n += 1) await signIn(wrong).catch(() => undefined);
    await write((tx) => tx.update(loginAttempts).set({ at: new Date(Date.now() - 16 * 60_000) }));
    await signIn({ email: person.email, password: goodPassword });
    for (let n = 0; n < 9; n += 1) await signIn(wrong).catch(() => undefined);
    await expect(signIn({ email: person.email, password: goodPassword })).resolves.toBeTruthy();
  });

  it("refuses everybody for a while when all accounts together see too many attempts", async () => {
    const person = await makePerson();
    await write((tx) =>
      tx
        .insert(loginAttempts)
        .values(Array.from({ length: 120 }, () => ({ account: unique("swept"), at: new Date() }))),
    );
    await expect(signIn({ email: person.email, password: goodPassword })).rejects.toMatchObject({
      code: "too-many-requests",
    });
    await write((tx) => tx.delete(loginAttempts));
    await expect(signIn({ email: person.email, password: goodPassword })).resolves.toBeTruthy();
  });
});

describe("a session", () => {
  it("ends with the sign-out for a cookie that was taken before it", async () => {
    const person = await makePerson();
    const { sessionId } = await signIn({ email: person.email, password: goodPassword });
    const cookie = await cookieOf(sessionId);
    const actor = await actorFromRequest(request(cookie));
    expect(actor).toMatchObject({ kind: "person", personId: person.personId });
    if (actor) await signOut(actor);
    expect(await actorFromRequest(request(cookie))).toBeNull();
  });

  it("ends with next-auth's own sign-out event", async () => {
    const { sessionId } = await makePerson();
    const event = authOptions().events?.signOut;
    await event?.({ token: { sid: sessionId }, session: undefined as never });
    expect(await findSession(sessionId)).toBeNull();
  });

  it("ends at once when its person is deactivated, and when it expires", async () => {
    const gone = await makePerson();
    await deactivate(gone.personId);
    expect(await findSession(gone.sessionId)).toBeNull();
    const late = await makePerson();
    await write((tx) =>
      tx
        .update(sessions)
        .set({ createdAt: new Date(1), expiresAt: new Date(2) })
        .where(eq(sessions.id, late.sessionId)),
    );
    expect(await findSession(late.sessionId)).toBeNull();
  });

  it.each([
    ["garbage", async () => "coldface.session=garbage"],
    ["no value", async () => "coldface.session="],
    ["another cookie", async () => "other=1"],
    ["5 kB", async () => `coldface.session=${"a".repeat(5000)}`],
    [
      "another installation's secret",
      async () => {
        const { sessionId } = await makePerson();
        return `coldface.session=${await encode({ token: { sid: sessionId }, secret: "x".repeat(40) })}`;
      },
    ],
    ["an unknown session", () => cookieOf("ses_unknown")],
  ])("does not come from a cookie with %s", async (_what, cookie) => {
    expect(await actorFromRequest(request(await cookie()))).toBeNull();
  });

  it.each<[string, string, Record<string, string>, string | null]>([
    [
      "same origin by fetch metadata",
      "POST",
      { "sec-fetch-site": "same-origin", "content-type": "application/json" },
      null,
    ],
    [
      "another site",
      "POST",
      { "sec-fetch-site": "cross-site", "content-type": "application/json" },
      "forbidden",
    ],
    ["a sibling site", "DELETE", { "sec-fetch-site": "same-site" }, "forbidden"],
    ["this Origin", "PUT", { origin: "http://localhost:3000", "content-type": "application/json" }, null],
    [
      "a foreign Origin",
      "PUT",
      { origin: "https://evil.example", "content-type": "application/json" },
      "forbidden",
    ],
    ["Origin null", "POST", { origin: "null", "content-type": "application/json" }, "forbidden"],
    ["no word of where from", "POST", { "content-type": "application/json" }, "forbidden"],
    [
      "a form's content type",
      "POST",
      { "sec-fetch-site": "same-origin", "content-type": "text/plain;charset=utf-8" },
      "unsupported-type",
    ],
    ["no content type", "POST", { "sec-fetch-site": "same-origin" }, "unsupported-type"],
    ["a mere reading from elsewhere", "GET", { "sec-fetch-site": "cross-site" }, null],
  ])("with %s on %s", async (_what, method, headers, code) => {
    const { sessionId } = await makePerson();
    const asked = actorFromRequest(request(await cookieOf(sessionId), { method, headers }));
    if (code === null) expect(await asked).toMatchObject({ kind: "person" });
    else await expect(asked).rejects.toMatchObject({ code });
  });
});

describe("the cookies and addresses of next-auth", () => {
  it("go only to addresses of this site after signing in", async () => {
    const redirect = authOptions().callbacks?.redirect;
    const to = (url: string) => redirect?.({ url, baseUrl: "http://localhost:3000" });
    expect(await to("/records?tag=P-101")).toBe("http://localhost:3000/records?tag=P-101");
    expect(await to("http://localhost:3000/templates")).toBe("http://localhost:3000/templates");
    for (const evil of [
      "https://evil.example/",
      "//evil.example",
      "/\\evil.example",
      "javascript:alert(1)",
      "http://",
    ]) {
      expect(await to(evil)).toBe("http://localhost:3000");
    }
  });

  it("are for this host only and closed to scripts", () => {
    const { cookies } = authOptions();
    expect(cookies?.sessionToken).toEqual({
      name: "coldface.session",
      options: { httpOnly: true, sameSite: "lax", path: "/", secure: false },
    });
  });

  it("give no person once the session has ended", async () => {
    const person = await makePerson();
    const callback = authOptions().callbacks?.session;
    const ask = () =>
      callback?.({ session: { expires: "x" }, token: { sid: person.sessionId } } as Parameters<
        typeof callback
      >[0]);
    expect(await ask()).toMatchObject({ user: { name: person.name } });
    await signOut(person);
    expect((await ask())?.user).toBeUndefined();
  });
});
