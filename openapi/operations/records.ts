import { paths } from "@/lib/core/paths";
import { operation } from "@/lib/http/operation";
import {
  CreateRecordBody,
  ListRecordsQuery,
  RecordPage,
  RecordParam,
  RecordView,
  Rerun,
  RerunRecordBody,
  VoidRecordBody,
  type KeptRecord,
} from "@/lib/records/schemas";
import { RevisionParam, SlugParam } from "@/lib/templates/schemas";
import { evaluation, record, runInputs } from "../examples";
import { lifecycleHeaderNames, lifecycleHeaders } from "../lifecycle";

const tag = "Records";

const create = {
  method: "POST",
  tag,
  scope: "records:write",
  idempotent: true,
  reply: {
    status: 201,
    description: "The record, kept",
    schema: RecordView,
    headers: ["Location", ...lifecycleHeaderNames],
  },
  refusals: [
    "forbidden",
    "withdrawn",
    "state-conflict",
    "missing-input",
    "not-accepted",
    "crossed-bounds",
    "unknown-member",
    "invalid-input",
    "unreadable-unit",
    "unknown-material",
    "unit-mismatch",
    "out-of-range",
    "outside-validity",
    "no-solution",
    "not-finite",
    "not-converged",
    "budget-exceeded",
  ],
  present: ({ record: body, lifecycle }: KeptRecord) => ({
    body,
    headers: { Location: paths.apiRecord(body.number), ...lifecycleHeaders(lifecycle) },
  }),
} as const;

const described =
  "Runs the revision and keeps the run with everything needed to repeat it. The body is that of a run, with title, note, tags and, where inputs were not typed, their origins. Send an Idempotency-Key: the same request again is given the same record.";

const success = {
  summary: "A wall",
  body: { inputs: runInputs, title: record.title, tags: ["CS-101"] },
  reply: record,
} as const;

const failure = {
  summary: "A thickness of nothing",
  body: { inputs: { t: 0 } },
  code: "out-of-range",
  detail: "Thickness is 0 mm. It must be greater than 0.",
  errors: [
    {
      pointer: "#/inputs/t",
      code: "out-of-range",
      message: "Thickness is 0 mm. It must be greater than 0.",
      received: 0,
      limit: 0,
    },
  ],
} as const;

export const createRecord = operation({
  ...create,
  id: "createRecord",
  path: "/templates/{slug}/records",
  summary: "Keep a record of the issued revision",
  description: described,
  request: { params: SlugParam, body: CreateRecordBody, bodyOptional: true, collects: true },
  examples: {
    success: { ...success, params: { slug: "plane-wall" } },
    failure: { ...failure, params: { slug: "plane-wall" } },
  },
});

export const createRevisionRecord = operation({
  ...create,
  id: "createRevisionRecord",
  path: "/templates/{slug}/revisions/{revision}/records",
  summary: "Keep a record of a pinned revision",
  description: described,
  request: { params: RevisionParam, body: CreateRecordBody, bodyOptional: true, collects: true },
  examples: {
    success: { ...success, params: { slug: "plane-wall", revision: "1" } },
    failure: { ...failure, params: { slug: "plane-wall", revision: "1" } },
  },
});

const unknownRecord = {
  summary: "No such record",
  params: { number: "R-999999" },
  code: "not-found",
  detail: "Nothing is here for you. Check the address, and that you may see what it names.",
} as const;

export const listRecords = operation({
  id: "listRecords",
  method: "GET",
  path: "/records",
  summary: "List records",
  description: "Latest first. `owner=me` lists the records that you (or your key's owner) answer for.",
  tag,
  scope: "records:read",
  request: { query: ListRecordsQuery },
  reply: { status: 200, description: "A page of records", schema: RecordPage },
  refusals: [],
  examples: {
    success: {
      summary: "Records of one template",
      query: { template: "plane-wall", limit: "20" },
      reply: {
        items: [
          {
            number: record.number,
            template: "plane-wall",
            templateTitle: "Plane wall, one layer",
            revision: 1,
            status: "ok",
            title: record.title,
            tags: record.tags,
            createdAt: record.createdAt,
            createdBy: record.createdBy,
            voided: false,
          },
        ],
        nextCursor: null,
      },
    },
    failure: {
      summary: "A page that is too long",
      query: { limit: "1000" },
      code: "out-of-range",
      detail: "“limit” must be at most 200.",
      errors: [
        {
          pointer: "#/query/limit",
          code: "out-of-range",
          message: "“limit” must be at most 200.",
          received: "1000",
          limit: 200,
        },
      ],
    },
  },
});

export const getRecord = operation({
  id: "getRecord",
  method: "GET",
  path: "/records/{number}",
  summary: "Read a record",
  description: "The record as it was kept. Nothing is calculated again.",
  tag,
  scope: "records:read",
  request: { params: RecordParam },
  reply: { status: 200, description: "The record", schema: RecordView },
  refusals: [],
  etag: true,
  examples: {
    success: { summary: "A record", params: { number: "R-000001" }, reply: record },
    failure: unknownRecord,
  },
});

export const voidRecord = operation({
  id: "voidRecord",
  method: "POST",
  path: "/records/{number}/void",
  summary: "Void a record",
  description:
    "Declares that the record is not to be used, with a reason. It stays readable and is never deleted.",
  tag,
  scope: "records:write",
  idempotent: true,
  request: { params: RecordParam, body: VoidRecordBody },
  reply: { status: 200, description: "The record, void", schema: RecordView },
  refusals: ["forbidden", "state-conflict"],
  examples: {
    success: {
      summary: "Wrong pipe",
      params: { number: "R-000001" },
      body: { reason: "Entered for the wrong wall." },
      reply: {
        ...record,
        void: { reason: "Entered for the wrong wall.", at: "2026-02-03T10:00:00.000Z", by: record.createdBy },
      },
    },
    failure: { ...unknownRecord, body: { reason: "Entered twice." } },
  },
});

export const rerunRecord = operation({
  id: "rerunRecord",
  method: "POST",
  path: "/records/{number}/rerun",
  summary: "Run a record again",
  description:
    "Runs the request of the record with its own revisions of template and materials, withdrawn ones too, or on the current ones. Keeps nothing; answers both evaluations and the results that differ in any digit.",
  tag,
  scope: "records:read",
  request: { params: RecordParam, body: RerunRecordBody, bodyOptional: true },
  reply: { status: 200, description: "Both evaluations and their deviations", schema: Rerun },
  refusals: [
    "missing-input",
    "unknown-member",
    "invalid-input",
    "unknown-material",
    "unit-mismatch",
    "out-of-range",
    "outside-validity",
    "no-solution",
    "not-finite",
    "not-converged",
    "budget-exceeded",
  ],
  examples: {
    success: {
      summary: "The same digits",
      params: { number: "R-000001" },
      body: { on: "record" },
      reply: {
        number: "R-000001",
        on: "record",
        same: true,
        before: evaluation,
        after: evaluation,
        deviations: [],
      },
    },
    failure: { ...unknownRecord, body: {} },
  },
});
