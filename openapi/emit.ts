import { readFileSync, writeFileSync } from "node:fs";
import { format } from "prettier";
import { openApiDocument } from "./document";

/** Writes openapi/openapi.json, or with --check says whether it is what the operations make. */

const file = new URL("./openapi.json", import.meta.url);
const text = await format(JSON.stringify(openApiDocument("http://localhost:3000")), {
  parser: "json",
  printWidth: 110,
});

if (process.argv.includes("--check")) {
  if (readFileSync(file, "utf8") !== text) {
    console.error("openapi/openapi.json differs from the operations. Run: npm run openapi");
    process.exit(1);
  }
  console.log("openapi/openapi.json is what the operations make.");
} else {
  writeFileSync(file, text);
  console.log(`Wrote openapi/openapi.json (${text.length} characters).`);
}
