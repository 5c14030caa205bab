import { describe, expect, it } from "vitest";
import { roles, scopes, type Role, type Scope } from "@/db/vocabulary";
import { actions, visibleStates, type Action } from "@/lib/access/actions";
import { may, permit } from "@/lib/access/permit";
import { CodedError } from "@/lib/core/errors";
import { keyActor, personActor, system } from "../factories/people";

/** Who may do what, written down a second time: product.md's table as it stands for the actions there are. */
const table: Record<Action, { roles: Role[]; adminAlone: boolean; scope: Scope | null; system: boolean }> = {
  "template.list": {
    roles: ["reader", "engineer", "senior"],
    adminAlone: true,
    scope: "templates:read",
    system: true,
  },
  "template.read": {
    roles: ["reader", "engineer", "senior"],
    adminAlone: true,
    scope: "templates:read",
    system: true,
  },
  "template.evaluate": {
    roles: ["reader", "engineer", "senior"],
    adminAlone: true,
    scope: "runs:evaluate",
    system: true,
  },
  "template.supply": { roles: [], adminAlone: true, scope: null, system: true },
  "definition.check": { roles: ["senior"], adminAlone: false, scope: "templates:write", system: true },
  "definition.evaluate": { roles: ["senior"], adminAlone: false, scope: "templates:write", system: true },
  "material.list": {
    roles: ["reader", "engineer", "senior"],
    adminAlone: true,
    scope: "materials:read",
    system: true,
  },
  "material.read": {
    roles: ["reader", "engineer", "senior"],
    adminAlone: true,
    scope: "materials:read",
    system: true,
  },
  "material.supply": { roles: [], adminAlone: true, scope: null, system: true },
  "unit.read": {
    roles: ["reader", "engineer", "senior"],
    adminAlone: true,
    scope: "templates:read",
    system: true,
  },
  "record.list": {
    roles: ["reader", "engineer", "senior"],
    adminAlone: true,
    scope: "records:read",
    system: true,
  },
  "record.read": {
    roles: ["reader", "engineer", "senior"],
    adminAlone: true,
    scope: "records:read",
    system: true,
  },
  "record.create": { roles: ["engineer", "senior"], adminAlone: false, scope: "records:write", system: true },
  "record.void": { roles: ["engineer", "senior"], adminAlone: false, scope: "records:write", system: false },
  "record.rerun": {
    roles: ["reader", "engineer", "senior"],
    adminAlone: true,
    scope: "records:read",
    system: true,
  },
  "usage.read": {
    roles: ["reader", "engineer", "senior"],
    adminAlone: true,
    scope: "usage:read",
    system: true,
  },
  "session.end": { roles: ["reader", "engineer", "senior"], adminAlone: true, scope: null, system: false },
  "key.create": { roles: ["engineer", "senior"], adminAlone: true, scope: null, system: true },
  "key.list": { roles: ["engineer", "senior"], adminAlone: true, scope: null, system: true },
  "key.revoke": { roles: ["engineer", "senior"], adminAlone: true, scope: null, system: true },
  "audit.read": { roles: ["senior"], adminAlone: true, scope: null, system: true },
  "outbox.read": { roles: [], adminAlone: true, scope: null, system: true },
  "person.create": { roles: [], adminAlone: true, scope: null, system: true },
};

const names = Object.keys(actions) as Action[];
const owner = "per_owner";
/** An object that passes every rule on objects for somebody who owns it. */
const object = { slug: "plane-wall", state: "issued", template: "plane-wall", ownerId: owner };
const decide = may as (actor: Parameters<typeof may>[0], action: Action, object: unknown) => boolean;
const code = (ask: () => unknown) => {
  try {
    ask();
    return "permitted";
  } catch (error) {
    if (error instanceof CodedError) return error.code;
    throw error;
  }
};

describe("every action against every role", () => {
  it("is written down here and in the table, and nowhere is one more", () => {
    expect(Object.keys(table).sort()).toEqual([...names].sort());
  });

  it.each(names)("%s", (action) => {
    const row = table[action];
    for (const role of roles) {
      expect(decide(personActor(role, { personId: owner }), action, object), role).toBe(
        row.roles.includes(role),
      );
    }
    expect(decide(personActor("reader", { personId: owner, isAdmin: true }), action, object), "admin").toBe(
      row.adminAlone,
    );
    expect(decide(system, action, object), "system").toBe(row.system);
    expect(decide(null, action, object), "nobody").toBe(false);
  });

  it.each(names)("%s with a key: the scope, the owner's role, and no administrator's flag", (action) => {
    const row = table[action];
    for (const role of roles) {
      const full = keyActor(role, [...scopes], { owner: { personId: owner, role } });
      expect(decide(full, action, object), role).toBe(row.scope !== null && row.roles.includes(role));
      const lacking = { ...full, scopes: scopes.filter((scope) => scope !== row.scope) };
      expect(decide(lacking, action, object), `${role} without the scope`).toBe(false);
    }
  });
});

describe("the object of an action", () => {
  const issued = { slug: "plane-wall", state: "issued" } as const;
  const draft = { slug: "plane-wall", state: "draft" } as const;

  it("is not there for those who may not see its state", () => {
    for (const role of ["reader", "engineer"] as const) {
      expect(code(() => permit(personActor(role), "template.read", draft))).toBe("not-found");
      expect(code(() => permit(personActor(role), "material.read", { slug: "x", state: "in_check" }))).toBe(
        "not-found",
      );
    }
    expect(code(() => permit(personActor("senior"), "template.read", draft))).toBe("permitted");
    expect(visibleStates(personActor("engineer"))).toEqual(["issued", "superseded", "withdrawn"]);
  });

  it("is not there for a key that is limited to other templates", () => {
    const key = keyActor("senior", [...scopes], { templates: ["other"] });
    expect(code(() => permit(key, "template.evaluate", issued))).toBe("not-found");
    expect(code(() => permit(key, "record.create", issued))).toBe("not-found");
    expect(code(() => permit(key, "record.read", { template: "plane-wall", ownerId: null }))).toBe(
      "not-found",
    );
    expect(code(() => permit({ ...key, templates: ["plane-wall"] }, "template.evaluate", issued))).toBe(
      "permitted",
    );
  });

  it("is voided by its owner or a senior only", () => {
    const record = { template: "plane-wall", ownerId: owner };
    expect(code(() => permit(personActor("engineer", { personId: owner }), "record.void", record))).toBe(
      "permitted",
    );
    expect(code(() => permit(personActor("engineer"), "record.void", record))).toBe("forbidden");
    expect(code(() => permit(personActor("senior"), "record.void", record))).toBe("permitted");
    const key = keyActor("engineer", ["records:write"], { owner: { personId: owner, role: "engineer" } });
    expect(code(() => permit(key, "record.void", record))).toBe("permitted");
  });
});

describe("the refusal", () => {
  it("names the scope that a key lacks", () => {
    expect(() => permit(keyActor("engineer", ["templates:read"]), "record.list")).toThrow(
      expect.objectContaining({ code: "insufficient-scope", extra: { scope: "records:read" } }),
    );
  });

  it("is 401 for nobody, 403 for too low a role, 403 for a key where a session is wanted", () => {
    expect(code(() => permit(null, "template.list"))).toBe("unauthenticated");
    expect(code(() => permit(personActor("reader"), "record.create", { slug: "x" }))).toBe("forbidden");
    expect(code(() => permit(keyActor("senior", [...scopes]), "audit.read"))).toBe("forbidden");
  });
});
