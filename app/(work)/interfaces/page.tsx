import type { Metadata } from "next";
import { CopyBlock } from "@/app/_components/copy-block";
import { PageFrame, Sheet } from "@/app/_components/page-frame";
import { requireActor } from "@/app/_components/require-actor";
import { curlSnippet } from "@/app/_components/snippets";
import { ButtonLink } from "@/app/_components/ui/button";
import type { Definition } from "@/lib/calculation/definition";
import type { GivenInputs } from "@/lib/calculation/evaluation";
import { env } from "@/lib/core/env";
import { paths } from "@/lib/core/paths";
import { getTemplate } from "@/lib/templates/get-template";
import { listTemplates } from "@/lib/templates/list-templates";
import { TemplatePicker } from "./_components/template-picker";

export const metadata: Metadata = { title: "Interfaces" };

/** A call that shows both ways to give a number: bare in the declared unit, and with a unit of one's own. */
function exampleInputs(definition: Definition): GivenInputs {
  const numbers = definition.inputs
    .filter((input) => input.kind === "number" && input.default !== undefined)
    .slice(0, 3);
  return Object.fromEntries(
    numbers.flatMap((input, index) =>
      input.kind === "number" && input.default !== undefined
        ? [[input.symbol, index === 0 ? { value: input.default, unit: input.unit } : input.default]]
        : [],
    ),
  );
}

export default async function InterfacesPage({
  searchParams,
}: {
  searchParams: Promise<{ template?: string | string[] }>;
}) {
  const actor = await requireActor();
  const { template } = await searchParams;
  const templates = (await listTemplates(actor, { limit: 200, state: "issued" })).items;
  const chosen =
    templates.find((item) => item.slug === template) ??
    templates.find((item) => item.slug === "insulated-pipe") ??
    templates[0];
  const view = chosen ? await getTemplate(actor, { slug: chosen.slug }) : null;
  const origin = env().PUBLIC_URL;
  return (
    <PageFrame
      title="Interfaces"
      meta={
        <span className="text-muted">
          The same issued revisions, for other software, over REST with keys.
        </span>
      }
      actions={
        <>
          <ButtonLink href={paths.reference}>Reference</ButtonLink>
          <a
            href={paths.api("/openapi.json")}
            className="inline-flex min-h-9 items-center rounded border border-rule bg-sheet px-3.5 font-[550] hover:border-ink max-md:min-h-11"
          >
            OpenAPI document
          </a>
        </>
      }
    >
      <Sheet className="grid lg:grid-cols-[360px_minmax(0,1fr)]">
        <div className="border-rule px-6 py-5 max-lg:border-b max-md:px-4 lg:border-r">
          <h2 className="mb-2">A first call</h2>
          <ol className="list-decimal space-y-2 pl-5">
            <li>
              Get a key from whoever runs this installation (
              <code className="num text-[13px]">npm run key</code>). It is shown once.
            </li>
            <li>
              Put it into the environment: <code className="num text-[13px]">export COLDFACE_KEY=cfk_…</code>
            </li>
            <li>
              Run the call that is shown here. Inputs that are left out keep their defaults and are named in
              the reply.
            </li>
          </ol>
          <h2 className="mb-1 mt-5">What a value looks like</h2>
          <p className="text-muted">
            A bare number is in the unit that the template declares;{" "}
            <code className="num text-[13px] text-ink">{`{"value": 3, "unit": "in"}`}</code> may be in any
            unit of the same quantity. Results carry their unit as engineers write it and as UCUM code. Ask
            for other units with <code className="num text-[13px] text-ink">units</code>.
          </p>
          <h2 className="mb-1 mt-5">Pin what you rely on</h2>
          <p className="text-muted">
            A call by slug runs the current revision. Put{" "}
            <code className="num text-[13px] text-ink">/revisions/{view?.current.revision ?? 1}</code> behind
            the slug to stay on one: an issued revision never changes, and its reply says when it is
            superseded.
          </p>
        </div>
        <div className="min-w-0 px-6 py-5 max-md:px-4">
          {view && chosen ? (
            <>
              <TemplatePicker
                chosen={chosen.slug}
                templates={templates.map((item) => ({ slug: item.slug, title: item.title }))}
              />
              <CopyBlock
                label="curl"
                text={curlSnippet({
                  origin,
                  slug: chosen.slug,
                  revision: null,
                  inputs: exampleInputs(view.current.definition),
                  units: {},
                })}
              />
              <p className="mt-3 text-[13px] text-muted">
                On a template’s page, “As a call” gives the same with what its form holds.
              </p>
            </>
          ) : (
            <p className="text-muted">There is no issued template to call yet.</p>
          )}
        </div>
      </Sheet>
    </PageFrame>
  );
}
