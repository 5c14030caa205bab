import next from "eslint-config-next/core-web-vitals";
import nextTypescript from "eslint-config-next/typescript";
import boundaries from "eslint-plugin-boundaries";

/**
 * Rooms of the house and who may import whom (the map is in DEVELOPERS.md). Default deny: a room that is not
 * named on the right may not be imported. Order matters for the patterns: the first that matches names the room.
 */
const engine = ["numeric", "units", "language", "calculation"];
const nouns = ["people", "materials", "templates", "records"];
const ground = ["core", "db", "access", "audit", "outbox", "usage", "compute", ...engine];

/** Rooms by folder; each file belongs to the first that holds it. */
const rooms = {
  tests: "tests",
  db: "db",
  openapi: "openapi",
  app: "app",
  core: "lib/core",
  numeric: "lib/numeric",
  units: "lib/units",
  language: "lib/language",
  calculation: "lib/calculation",
  compute: "lib/compute",
  access: "lib/access",
  audit: "lib/audit",
  outbox: "lib/outbox",
  usage: "lib/usage",
  people: "lib/people",
  materials: "lib/materials",
  templates: "lib/templates",
  records: "lib/records",
  http: "lib/http",
  sheet: "lib/sheet",
  commands: "lib/commands",
};

/** Single files of a room that others may import without the rest of it. */
const files = {
  vocabulary: "db/vocabulary.ts",
  operation: "lib/http/operation.ts",
  schemas: "lib/{people,materials,templates,records}/schemas.ts",
};

/** Who may import whom: rooms, and after them single files of other rooms. */
const may = {
  core: [["core"], []],
  numeric: [["numeric"], []],
  units: [["units"], []],
  language: [["language", "units", "numeric"], []],
  calculation: [["calculation", "language", "units", "numeric", "core"], []],
  compute: [["compute", "calculation", "core"], []],
  db: [["db", "core"], []],
  access: [["access", "core", "db"], []],
  audit: [["audit", "access", "core", "db"], []],
  outbox: [["outbox", "access", "core", "db"], []],
  usage: [["usage", "access", "core", "db"], []],
  people: [["people", ...ground], []],
  materials: [["materials", "people", ...ground], []],
  templates: [["templates", "people", "materials", ...ground], []],
  records: [["records", "people", "materials", "templates", ...ground], []],
  http: [["http", "core", "access", "db"], []],
  sheet: [["sheet", "calculation", "language", "units"], []],
  openapi: [
    ["openapi", "core", "units", "calculation"],
    ["schemas", "operation", "vocabulary"],
  ],
  app: [
    [
      "app",
      "openapi",
      "http",
      "sheet",
      "access",
      "core",
      "units",
      "language",
      "calculation",
      "usage",
      ...nouns,
    ],
    ["vocabulary"],
  ],
  commands: [Object.keys(rooms).filter((room) => room !== "tests" && room !== "app"), []],
  tests: [Object.keys(rooms), []],
};

const config = [
  { ignores: ["**/.next/**", "dist/**", "data/**", "node_modules/**", "next-env.d.ts", "coverage/**"] },
  ...next,
  ...nextTypescript,
  {
    plugins: { boundaries },
    settings: {
      "import/resolver": { typescript: { alwaysTryTypes: true } },
      "boundaries/elements": Object.entries(rooms).map(([type, pattern]) => ({ type, pattern })),
      "boundaries/files": Object.entries(files).map(([category, pattern]) => ({ category, pattern })),
    },
    rules: {
      "boundaries/dependencies": [
        "error",
        {
          default: "disallow",
          policies: [
            ...Object.entries(may).flatMap(([type, [allowed, single]]) => [
              { from: { element: { type } }, allow: { to: { element: { types: { anyOf: allowed } } } } },
              ...single.map((category) => ({
                from: { element: { type } },
                allow: { to: { file: { categories: category } } },
              })),
            ]),
            { from: { element: { type: "*" } }, allow: { to: { module: { origin: ["external", "core"] } } } },
          ],
        },
      ],
      "@typescript-eslint/no-explicit-any": "error",
      "@typescript-eslint/consistent-type-imports": "error",
      "@typescript-eslint/no-unused-vars": [
        "error",
        { argsIgnorePattern: "^_", varsIgnorePattern: "^_", caughtErrors: "all" },
      ],
      eqeqeq: "error",
      "no-restricted-syntax": [
        "error",
        {
          selector: "CallExpression[callee.name='parseInt'][arguments.length=1]",
          message: "Give the radix.",
        },
      ],
    },
  },
];

export default config;
