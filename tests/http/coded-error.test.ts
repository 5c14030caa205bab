import { expect, it, vi } from "vitest";
import { CodedError } from "@/lib/core/errors";

it("is known as a CodedError also when the bundler has loaded its module a second time", async () => {
  vi.resetModules();
  const again = await import("@/lib/core/errors");
  expect(again.CodedError).not.toBe(CodedError);
  expect(new again.CodedError("busy", "Later.")).toBeInstanceOf(CodedError);
  expect(new CodedError("busy", "Later.") instanceof again.CodedError).toBe(true);
  for (const other of [new Error("busy"), null, undefined, "busy", { code: "busy" }])
    expect(other instanceof CodedError).toBe(false);
});
