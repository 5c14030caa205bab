import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { listQuantities } from "@/lib/templates/list-catalogue";
import * as operations from "@/openapi/operations/catalogue";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: endpoint(operations.listQuantities, listQuantities),
});
