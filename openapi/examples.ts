import type { TemplateEvaluation } from "@/lib/calculation/evaluation";
import type { MaterialView } from "@/lib/materials/schemas";
import type { RecordView } from "@/lib/records/schemas";
import type { RevisionSummary, TemplateItem } from "@/lib/templates/schemas";

/** Answers that several operations show: a plane wall of 100 mm between 150 °C and 20 °C. */

const hash = "6f1e0a0c4d0f5b1d1f7f9f0e6c3a2b4d5e6f708192a3b4c5d6e7f8091a2b3c4d";
const suppliedSet = { id: null, name: "supplied set" };
const issuedAt = "2026-01-15T08:00:00.000Z";

export const runInputs = {
  t: { value: 4, unit: "in" },
  k: 0.04,
  T_hot: { value: 302, unit: "°F" },
};

export const evaluation: TemplateEvaluation = {
  template: "plane-wall",
  revision: 1,
  definitionHash: hash,
  engine: "1.0.0",
  status: "ok",
  inputs: {
    A: { value: 1, unit: "m²", ucum: "m2", si: 1 },
    t: { value: 4, unit: "in", ucum: "[in_i]", si: 0.1016 },
    k: { value: 0.04, unit: "W/(m·K)", ucum: "W/(m.K)", si: 0.04 },
    T_hot: { value: 302, unit: "°F", ucum: "[degF]", si: 423.15 },
    T_cold: { value: 20, unit: "°C", ucum: "Cel", si: 293.15 },
  },
  defaulted: ["A", "T_cold"],
  results: {
    R: {
      value: 2.54,
      unit: "K/W",
      ucum: "K/W",
      label: "Resistance of the wall",
      quantity: "thermal resistance",
    },
    q: { value: 51.18110236220472, unit: "W/m²", ucum: "W/m2", label: "Heat flux", quantity: "heat flux" },
    Q: { value: 51.18110236220472, unit: "W", ucum: "W", label: "Heat flow", quantity: "heat flow rate" },
  },
  limits: [],
  cautions: [],
  notices: [
    {
      code: "template",
      message:
        "Handbook conductivities of building materials and insulations carry 5 to 10 % (common practice, no source).",
    },
  ],
  materials: [],
};

export const record: RecordView = {
  number: "R-000001",
  ...evaluation,
  steps: [
    { symbol: "R", expression: "t/(k*A)", value: 2.54, unit: "K/W" },
    { symbol: "q", expression: "k*(T_hot - T_cold)/t", value: 51.18110236220472, unit: "W/m²" },
    { symbol: "Q", expression: "q*A", value: 51.18110236220472, unit: "W" },
  ],
  given: { inputs: runInputs },
  origins: { A: "default", t: "typed", k: "typed", T_hot: "typed", T_cold: "default" },
  title: "Cold store, wall to the loading bay",
  note: "",
  tags: ["CS-101"],
  createdAt: "2026-02-03T09:30:00.000Z",
  createdBy: { kind: "person", id: "per_01kgj4n8v0s6c1d2e3f4g5h6j7", name: "Engineer" },
  node: "v20.20.0",
  digest: "0b7c4f2e9a1d3c5b7e9f1a3c5d7e9f0b2d4f6a8c0e1b3d5f7a9c1e3b5d7f9a1c",
  void: null,
};

export const revisionSummary: RevisionSummary = {
  template: "plane-wall",
  revision: 1,
  state: "issued",
  title: "Plane wall, one layer",
  definitionHash: hash,
  engine: "1.0.0",
  supplied: true,
  adopted: false,
  originators: [suppliedSet],
  checkedBy: suppliedSet,
  issuedBy: suppliedSet,
  issuedAt,
  supersededAt: null,
  withdrawnAt: null,
  withdrawnReason: null,
  withdrawalDate: null,
  verifyBy: "2027-01-15T08:00:00.000Z",
  reasonForChange: null,
};

export const templateItem: TemplateItem = {
  slug: "plane-wall",
  title: "Plane wall, one layer",
  summary: "Heat flow through one flat layer between two known face temperatures.",
  category: "walls",
  tags: ["wall", "plate"],
  revision: 1,
  state: "issued",
  supplied: true,
  adopted: false,
  issuedAt,
  issuedBy: suppliedSet,
  verifyBy: "2027-01-15T08:00:00.000Z",
  withdrawalDate: null,
  runsLast30Days: 212,
};

/** A whole definition, as small as one can be. */
export const definition = {
  title: "Wall resistance",
  summary: "Resistance of one flat layer.",
  category: "walls" as const,
  tags: [],
  references: [],
  notices: [],
  inputs: [
    {
      kind: "number" as const,
      symbol: "t",
      label: "Thickness",
      quantity: "length",
      unit: "mm",
      default: 100,
      above: 0,
    },
    {
      kind: "number" as const,
      symbol: "k",
      label: "Conductivity",
      quantity: "thermal conductivity",
      unit: "W/(m·K)",
      default: 0.04,
      above: 0,
    },
  ],
  requires: [],
  working: "R = t/k",
  results: [{ symbol: "R", label: "Resistance", quantity: "thermal insulance", unit: "m²·K/W" }],
  limits: [],
  figures: [],
  cases: [],
};

export const materialView: MaterialView = {
  slug: "fireclay-brick",
  class: "refractory",
  createdAt: issuedAt,
  current: {
    material: "fireclay-brick",
    revision: 1,
    state: "issued",
    title: "Fireclay brick",
    definitionHash: hash,
    engine: "1.0.0",
    supplied: true,
    adopted: false,
    originators: [suppliedSet],
    checkedBy: suppliedSet,
    issuedBy: suppliedSet,
    issuedAt,
    supersededAt: null,
    withdrawnAt: null,
    withdrawnReason: null,
    withdrawalDate: null,
    verifyBy: null,
    reasonForChange: null,
    definition: {
      name: "Fireclay brick",
      class: "refractory",
      condition: "Dense, fired",
      properties: {
        k: {
          pieces: [{ form: "constant", value: 1.7, range: { min: 300, max: 1600, unit: "K" } }],
          argumentUnit: "K",
          unit: "W/(m·K)",
          source: "Handbook value",
          basis: "from memory",
          status: "typical",
        },
      },
    },
  },
};
