import { operation } from "@/lib/http/operation";
import {
  ListMaterialsQuery,
  MaterialPage,
  MaterialParam,
  MaterialRevisionParam,
  MaterialRevisionView,
  MaterialView,
  PropertyParam,
  PropertyValue,
  PropertyValueQuery,
} from "@/lib/materials/schemas";
import { materialView } from "../examples";

const tag = "Materials";
const scope = "materials:read";
const colderThanItsData =
  "The thermal conductivity of Fireclay brick was asked at 20 K. It is valid from 478 K to 1478 K (Incropera & DeWitt, Fundamentals of Heat and Mass Transfer, Table A.3). Choose a material whose range holds this temperature, or allow extrapolation.";
const unknownMaterial = {
  summary: "No such material",
  params: { slug: "firebrick" },
  code: "not-found",
  detail: "Nothing is here for you. Check the address, and that you may see what it names.",
} as const;

export const listMaterials = operation({
  id: "listMaterials",
  method: "GET",
  path: "/materials",
  summary: "List materials",
  description: "One row per material, ordered by slug, with the valid range of each property.",
  tag,
  scope,
  request: { query: ListMaterialsQuery },
  reply: { status: 200, description: "A page of materials", schema: MaterialPage },
  refusals: [],
  examples: {
    success: {
      summary: "Refractories",
      query: { class: "refractory", limit: "1" },
      reply: {
        items: [
          {
            slug: "fireclay-brick",
            name: "Fireclay brick",
            class: "refractory",
            condition: "Dense, dry; handbook value for burnt brick.",
            revision: 1,
            state: "issued",
            supplied: true,
            adopted: false,
            issuedAt: "2026-01-15T08:00:00.000Z",
            properties: {
              k: { unit: "W/(m·K)", min: 478, max: 1478, argumentUnit: "K", basis: "from memory" },
            },
          },
        ],
        nextCursor: null,
      },
    },
    failure: {
      summary: "A cursor that is not ours",
      query: { cursor: "next" },
      code: "invalid-input",
      detail: "The cursor is not one of ours. Take nextCursor of the page before, or leave it out.",
      errors: [
        {
          pointer: "#/query/cursor",
          code: "invalid-input",
          message: "The cursor is not one of ours. Take nextCursor of the page before, or leave it out.",
        },
      ],
    },
  },
});

export const getMaterial = operation({
  id: "getMaterial",
  method: "GET",
  path: "/materials/{slug}",
  summary: "Read a material",
  description:
    "The material with the revision that a run by slug uses, all properties with source and range included.",
  tag,
  scope,
  request: { params: MaterialParam },
  reply: { status: 200, description: "The material", schema: MaterialView },
  refusals: [],
  etag: true,
  examples: {
    success: { summary: "A material", params: { slug: "fireclay-brick" }, reply: materialView },
    failure: unknownMaterial,
  },
});

export const getMaterialRevision = operation({
  id: "getMaterialRevision",
  method: "GET",
  path: "/materials/{slug}/revisions/{revision}",
  summary: "Read a revision of a material",
  description: "One revision with all its properties.",
  tag,
  scope,
  request: { params: MaterialRevisionParam },
  reply: { status: 200, description: "The revision", schema: MaterialRevisionView },
  refusals: [],
  etag: true,
  examples: {
    success: {
      summary: "Revision 1",
      params: { slug: "fireclay-brick", revision: "1" },
      reply: materialView.current,
    },
    failure: { ...unknownMaterial, params: { slug: "fireclay-brick", revision: "9" } },
  },
});

export const getPropertyValue = operation({
  id: "getPropertyValue",
  method: "GET",
  path: "/materials/{slug}/properties/{name}/value",
  summary: "Read a property at a temperature",
  description:
    "`T` is a number in `unit` (without it, in the unit of the property's argument) or an amount such as `480 °F`; with `to`, the mean from `T` to `to`. `in` asks for another unit of the answer.",
  tag,
  scope,
  request: { params: PropertyParam, query: PropertyValueQuery },
  reply: { status: 200, description: "The value", schema: PropertyValue },
  refusals: ["outside-validity", "unreadable-unit", "unit-mismatch", "not-converged"],
  examples: {
    success: {
      summary: "Conductivity at 700 K",
      params: { slug: "fireclay-brick", name: "k" },
      query: { T: "700", unit: "K" },
      reply: {
        material: "fireclay-brick",
        revision: 1,
        property: "k",
        value: 1.25,
        unit: "W/(m·K)",
        ucum: "W/(m.K)",
        T: { value: 700, unit: "K" },
        source: "Incropera & DeWitt, Fundamentals of Heat and Mass Transfer, Table A.3",
        basis: "from memory",
        cautions: [],
      },
    },
    failure: {
      summary: "Colder than its data",
      params: { slug: "fireclay-brick", name: "k" },
      query: { T: "20 K" },
      code: "outside-validity",
      detail: colderThanItsData,
      errors: [
        {
          pointer: "#/query/T",
          code: "outside-validity",
          message: colderThanItsData,
        },
      ],
    },
  },
});
