import type { Operation } from "@/lib/http/operation";
import * as catalogue from "./operations/catalogue";
import * as definitions from "./operations/definitions";
import * as materials from "./operations/materials";
import * as records from "./operations/records";
import * as runs from "./operations/runs";
import * as templates from "./operations/templates";

/** Every operation of the interface. The routes under app/api/v1 are these and no others; a test compares them. */
export const operations: readonly Operation[] = [
  templates,
  runs,
  records,
  definitions,
  materials,
  catalogue,
].flatMap((area) => Object.values(area) as unknown as Operation[]);
