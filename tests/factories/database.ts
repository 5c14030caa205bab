import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll } from "vitest";
import { closeDatabase } from "@/db/client";
import { migrateDatabase } from "@/db/migrate";

/** Settings that every test process runs with; set before the first `env()`. */
export function testSettings(file: string): Record<string, string> {
  return {
    DATABASE_URL: `file:${file}`,
    AUTH_SECRET: "auth-secret-of-the-tests-0123456789",
    KEY_SECRET: "key-secret-of-the-tests-0123456789",
    AUDIT_SECRET: "audit-secret-of-the-tests-0123456789",
    PUBLIC_URL: "http://localhost:3000",
  };
}

/**
 * One temporary file database with the real migrations for a test file. Call it at the top of the file; the path is
 * there from the first hook on.
 */
export function testDatabase(more: Record<string, string> = {}): { readonly file: string } {
  const folder = mkdtempSync(path.join(tmpdir(), "coldface-test-"));
  const file = path.join(folder, "test.db");
  Object.assign(process.env, testSettings(file), more);
  beforeAll(async () => {
    await migrateDatabase();
  });
  afterAll(() => {
    closeDatabase();
    rmSync(folder, { recursive: true, force: true });
  });
  return { file };
}
