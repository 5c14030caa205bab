import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { getRecord } from "@/lib/records/get-record";
import * as operations from "@/openapi/operations/records";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: endpoint(operations.getRecord, getRecord),
});
