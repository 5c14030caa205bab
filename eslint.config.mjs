import next from "eslint-config-next/core-web-vitals";
import nextTypescript from "eslint-config-next/typescript";
import boundaries from "eslint-plugin-boundaries";

/**
 * Rooms of the house and who may import whom (the map is in DEVELOPERS.md). Default deny: a room that is not
 * named on the right may not be imported. Order matters for the patterns: the first that matches names the room.
 */
const engine = ["numeric", "units", "language", "calculation"];
const nouns = ["people", "materials", "templates", "records"];
const ground = ["core", "db", "vocabulary", "access", "audit", "outbox", "usage", "compute", ...engine];

const rooms = {
  tests: "tests/**/*",
  vocabulary: "db/vocabulary.ts",
  db: "db/**/*",
  operation: "lib/http/operation.ts",
  paths: "lib/core/paths.ts",
  schemas: "lib/{people,materials,templates,records}/schemas.ts",
  core: "lib/core/**/*",
  numeric: "lib/numeric/**/*",
  units: "lib/units/**/*",
  language: "lib/language/**/*",
  calculation: "lib/calculation/**/*",
  compute: "lib/compute/**/*",
  access: "lib/access/**/*",
  audit: "lib/audit/**/*",
  outbox: "lib/outbox/**/*",
  usage: "lib/usage/**/*",
  people: "lib/people/**/*",
  materials: "lib/materials/**/*",
  templates: "lib/templates/**/*",
  records: "lib/records/**/*",
  http: "lib/http/**/*",
  sheet: "lib/sheet/**/*",
  commands: "lib/commands/**/*",
  openapi: "openapi/**/*",
  app: ["app/**/*", "proxy.ts"],
  start: ["instrumentation.ts", "instrumentation-node.ts"],
};

const may = {
  core: ["core", "paths"],
  paths: [],
  numeric: ["numeric"],
  units: ["units"],
  language: ["language", "units", "numeric"],
  calculation: ["calculation", "language", "units", "numeric", "core"],
  compute: ["compute", "calculation", "core"],
  vocabulary: [],
  db: ["db", "vocabulary", "core"],
  access: ["access", "core", "db", "vocabulary"],
  audit: ["audit", "access", "core", "db", "vocabulary"],
  outbox: ["outbox", "access", "core", "db", "vocabulary"],
  usage: ["usage", "access", "core", "db", "vocabulary"],
  schemas: ["schemas", "core", "units", "calculation", "vocabulary"],
  people: ["people", "schemas", ...ground],
  materials: ["materials", "schemas", "people", ...ground],
  templates: ["templates", "schemas", "people", "materials", ...ground],
  records: ["records", "schemas", "people", "materials", "templates", ...ground],
  operation: ["core"],
  http: ["http", "operation", "core", "paths", "access", "db", "vocabulary"],
  sheet: ["sheet", "calculation", "language", "units"],
  openapi: ["openapi", "schemas", "operation", "vocabulary", "core", "paths", "units", "calculation"],
  app: ["app", "openapi", "operation", "http", "sheet", "schemas", "vocabulary", "access", "core", "paths", "units", "language", "calculation", "usage", ...nouns],
  commands: Object.keys({ ...rooms }).filter((room) => room !== "tests"),
  start: Object.keys({ ...rooms }).filter((room) => room !== "tests"),
  tests: Object.keys({ ...rooms }),
};

const config = [
  { ignores: [".next/**", "dist/**", "data/**", "node_modules/**", "next-env.d.ts", "coverage/**"] },
  ...next,
  ...nextTypescript,
  {
    plugins: { boundaries },
    settings: {
      "import/resolver": { typescript: { alwaysTryTypes: true } },
      "boundaries/elements": Object.entries(rooms).map(([type, pattern]) => ({ type, pattern, partialMatch: false })),
    },
    rules: {
      "boundaries/dependencies": [
        "error",
        {
          default: "disallow",
          policies: [
            ...Object.entries(may).map(([type, allowed]) => ({
              from: { element: { type } },
              allow: { to: { element: { types: { anyOf: allowed } } } },
            })),
            { from: { element: { type: "*" } }, allow: { to: { module: { origin: ["external", "core"] } } } },
          ],
        },
      ],
      "@typescript-eslint/no-explicit-any": "error",
      "@typescript-eslint/consistent-type-imports": "error",
      "@typescript-eslint/no-unused-vars": ["error", { argsIgnorePattern: "^_", varsIgnorePattern: "^_", caughtErrors: "all" }],
      eqeqeq: "error",
      "no-restricted-syntax": [
        "error",
        { selector: "CallExpression[callee.name='parseInt'][arguments.length=1]", message: "Give the radix." },
      ],
    },
  },
];

export default config;
