import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { rerunRecord } from "@/lib/records/rerun-record";
import * as operations from "@/openapi/operations/records";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  POST: endpoint(operations.rerunRecord, rerunRecord),
});
