/** Every address of the product in one place. Browser-safe. */

export const apiBase = "/api/v1";

const part = encodeURIComponent;

export const paths = {
  home: "/",
  signIn: "/sign-in",
  setUp: "/set-up",
  templates: "/templates",
  template: (slug: string) => `/templates/${part(slug)}`,
  templateRevision: (slug: string, revision: number) => `/templates/${part(slug)}/revisions/${revision}`,
  materials: "/materials",
  material: (slug: string) => `/materials/${part(slug)}`,
  records: "/records",
  record: (number: string) => `/records/${part(number)}`,
  interfaces: "/interfaces",
  reference: "/interfaces/reference",
  team: "/team",
  problem: (code: string) => `/problems/${part(code)}`,
  /** An address of the interface, from the path of an operation with its parameters filled in. */
  api: (path: string) => `${apiBase}${path}`,
  apiTemplateRevision: (slug: string, revision: number) =>
    `${apiBase}/templates/${part(slug)}/revisions/${revision}`,
  apiRecord: (number: string) => `${apiBase}/records/${part(number)}`,
} as const;
