import { operation } from "@/lib/http/operation";
import {
  InputSchemaView,
  ListRevisionsQuery,
  ListTemplatesQuery,
  RevisionPage,
  RevisionParam,
  RevisionView,
  SlugParam,
  TemplatePage,
  TemplateView,
} from "@/lib/templates/schemas";
import { definition, revisionSummary, templateItem } from "../examples";

const tag = "Templates";
const scope = "templates:read";
const unknownTemplate = {
  summary: "No such template",
  params: { slug: "plain-wall" },
  code: "not-found",
  detail: "Nothing is here for you. Check the address, and that you may see what it names.",
} as const;
const unknownRevision = {
  ...unknownTemplate,
  summary: "No such revision",
  params: { slug: "plane-wall", revision: "9" },
} as const;

export const listTemplates = operation({
  id: "listTemplates",
  method: "GET",
  path: "/templates",
  summary: "List templates",
  description:
    "One row per template, ordered by slug: the issued revision, else the latest one that you may see. `search` finds words that begin a title, tag, symbol, label or quantity.",
  tag,
  scope,
  request: { query: ListTemplatesQuery },
  reply: { status: 200, description: "A page of templates", schema: TemplatePage },
  refusals: [],
  examples: {
    success: {
      summary: "Templates about walls",
      query: { search: "wall", category: "walls", limit: "1" },
      reply: { items: [templateItem], nextCursor: "WyJwbGFuZS13YWxsIl0" },
    },
    failure: {
      summary: "No such category",
      query: { category: "wall" },
      code: "invalid-input",
      detail:
        "“category” must be walls, pipes, joints, fins, shapes, transient or materials. Did you mean “walls”?",
      errors: [
        {
          pointer: "#/query/category",
          code: "invalid-input",
          message:
            "“category” must be walls, pipes, joints, fins, shapes, transient or materials. Did you mean “walls”?",
          received: "wall",
          expected: "walls, pipes, joints, fins, shapes, transient, materials",
        },
      ],
    },
  },
});

export const getTemplate = operation({
  id: "getTemplate",
  method: "GET",
  path: "/templates/{slug}",
  summary: "Read a template",
  description: "The template with the revision that a run by slug uses, definition included.",
  tag,
  scope,
  request: { params: SlugParam },
  reply: { status: 200, description: "The template", schema: TemplateView },
  refusals: [],
  etag: true,
  examples: {
    success: {
      summary: "A template",
      params: { slug: "plane-wall" },
      reply: {
        slug: "plane-wall",
        category: "walls",
        createdAt: "2026-01-15T08:00:00.000Z",
        current: { ...revisionSummary, definition },
      },
    },
    failure: unknownTemplate,
  },
});

export const listTemplateRevisions = operation({
  id: "listTemplateRevisions",
  method: "GET",
  path: "/templates/{slug}/revisions",
  summary: "List the revisions of a template",
  description: "All revisions that you may see, latest first, with who issued them and when they ended.",
  tag,
  scope,
  request: { params: SlugParam, query: ListRevisionsQuery },
  reply: { status: 200, description: "A page of revisions", schema: RevisionPage },
  refusals: [],
  examples: {
    success: {
      summary: "Revisions of one template",
      params: { slug: "plane-wall" },
      reply: { items: [revisionSummary], nextCursor: null },
    },
    failure: unknownTemplate,
  },
});

export const getTemplateRevision = operation({
  id: "getTemplateRevision",
  method: "GET",
  path: "/templates/{slug}/revisions/{revision}",
  summary: "Read a revision",
  description: "One revision with its definition. A withdrawn revision no longer runs but can still be read.",
  tag,
  scope,
  request: { params: RevisionParam },
  reply: { status: 200, description: "The revision", schema: RevisionView },
  refusals: [],
  etag: true,
  examples: {
    success: {
      summary: "Revision 1",
      params: { slug: "plane-wall", revision: "1" },
      reply: { ...revisionSummary, definition },
    },
    failure: unknownRevision,
  },
});

export const getInputSchema = operation({
  id: "getInputSchema",
  method: "GET",
  path: "/templates/{slug}/revisions/{revision}/schema",
  summary: "Read the input schema of a revision",
  description:
    "JSON Schema (2020-12) of what `inputs` of a run may hold. Bounds apply to bare numbers, which are in the declared unit.",
  tag,
  scope,
  request: { params: RevisionParam },
  reply: { status: 200, description: "The schema", schema: InputSchemaView },
  refusals: [],
  etag: true,
  examples: {
    success: {
      summary: "Inputs of a plane wall",
      params: { slug: "plane-wall", revision: "1" },
      reply: {
        $schema: "https://json-schema.org/draft/2020-12/schema",
        $id: "http://localhost:3000/api/v1/templates/plane-wall/revisions/1/schema",
        title: "Plane wall, one layer",
        type: "object",
        properties: { t: { title: "Thickness", type: "number", exclusiveMinimum: 0, description: "In mm." } },
        required: [],
        additionalProperties: false,
      },
    },
    failure: unknownRevision,
  },
});
