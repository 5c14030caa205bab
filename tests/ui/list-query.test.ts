import { describe, expect, it } from "vitest";
import { listQuery, nextAddress, pageFrom } from "@/app/_components/list-query";
import { CodedError } from "@/lib/core/errors";
import { ListTemplatesQuery } from "@/lib/templates/schemas";

describe("the query of a list page", () => {
  it("takes what the list understands", () => {
    const query = listQuery(ListTemplatesQuery, { search: "pipe", category: "pipes", limit: "10" });
    expect(query).toMatchObject({ search: "pipe", category: "pipes", limit: 10 });
  });

  it("drops what it does not understand and keeps the rest", () => {
    const query = listQuery(ListTemplatesQuery, {
      search: "pipe",
      category: "poetry",
      limit: "-4",
      state: ["issued", "draft"],
      unknown: "x",
    });
    expect(query).toMatchObject({ search: "pipe", limit: 50 });
    expect(query).not.toHaveProperty("category");
    expect(query).not.toHaveProperty("state");
    expect(query).not.toHaveProperty("unknown");
  });

  it("leads to the rows that follow with the same filters and no second cursor", () => {
    expect(nextAddress("/templates", { search: "pipe & fin", cursor: "old" }, "new")).toBe(
      "/templates?search=pipe+%26+fin&cursor=new",
    );
    expect(nextAddress("/templates", {}, null)).toBeNull();
  });

  it("begins at the first row when the cursor is none of ours, and hides no other error", async () => {
    const list = (cursor?: string) => {
      if (cursor === "torn") throw new CodedError("invalid-input", "The cursor is not one of ours.");
      if (cursor === "late") throw new CodedError("busy", "Later.");
      return Promise.resolve(cursor ?? "first");
    };
    const page = (cursor?: string) => pageFrom({ cursor }, async (query) => list(query.cursor));
    expect(await page("torn")).toBe("first");
    expect(await page("next")).toBe("next");
    await expect(page("late")).rejects.toThrow("Later.");
  });
});
