import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { createRecord } from "@/lib/records/create-record";
import * as operations from "@/openapi/operations/records";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  POST: endpoint(operations.createRevisionRecord, createRecord),
});
