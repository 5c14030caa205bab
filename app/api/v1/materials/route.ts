import { endpoint } from "@/lib/http/endpoint";
import { route } from "@/lib/http/route";
import { listMaterials } from "@/lib/materials/list-materials";
import * as operations from "@/openapi/operations/materials";

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = route({
  GET: endpoint(operations.listMaterials, listMaterials),
});
