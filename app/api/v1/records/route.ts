import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { listRecords } from "@/lib/records/list-records";
import * as operations from "@/openapi/operations/records";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: endpoint(operations.listRecords, listRecords),
});
