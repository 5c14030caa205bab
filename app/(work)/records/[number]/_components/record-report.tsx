import Link from "next/link";
import { LimitsPane } from "@/app/_components/run/limits-pane";
import { typesetWorking } from "@/app/_components/run/typeset";
import { WorkingTable } from "@/app/_components/run/working-table";
import { SectionStrip } from "@/app/_components/section-strip/section-strip";
import { StatusMark } from "@/app/_components/status-mark";
import { momentText } from "@/app/_components/time-text";
import { TitleBlock } from "@/app/_components/title-block";
import { keeperText } from "@/app/_components/keeper-text";
import type { PersonActor } from "@/lib/access/actor";
import { paths } from "@/lib/core/paths";
import { getMaterialRevision } from "@/lib/materials/get-material";
import { installation } from "@/lib/people/installation";
import type { RecordView } from "@/lib/records/schemas";
import { sectionModel } from "@/lib/sheet/section-model";
import type { RevisionView } from "@/lib/templates/schemas";
import { InputsTable } from "./inputs-table";
import { RecordActions } from "./record-actions";
import { RecordResults } from "./record-results";

interface Props {
  actor: PersonActor;
  record: RecordView;
  revision: RevisionView;
}

/** A record as it was kept; nothing on this page is calculated again unless somebody asks for it. */
export async function RecordReport({ actor, record, revision }: Props) {
  const works = await installation();
  const { definition } = revision;
  const mayVoid =
    record.void === null &&
    (actor.role === "senior" || (actor.role === "engineer" && record.createdBy.id === actor.personId));
  const figure = definition.figures.find((candidate) => candidate.kind === "section");
  const labels = Object.fromEntries(
    definition.inputs.map((input) => [input.symbol, input.label.toLowerCase()]),
  );
  const materials = await materialsOf(actor, record);
  const section = figure?.kind === "section" ? sectionModel(figure, record, { ...materials, labels }) : null;

  return (
    <main
      id="main"
      tabIndex={-1}
      className="mx-auto max-w-page px-8 pb-12 pt-6 outline-none max-md:px-0 max-md:pt-4"
    >
      <nav aria-label="Where this is" className="text-[13px] text-muted max-md:px-4">
        <Link prefetch={false} href={paths.records} className="hover:text-ink">
          Records
        </Link>
        {" · "}
        <Link
          prefetch={false}
          href={paths.templateRevision(record.template, record.revision)}
          className="hover:text-ink"
        >
          {definition.title}, revision {record.revision}
        </Link>
      </nav>
      <div className="mb-5 flex flex-wrap items-end gap-x-6 gap-y-2 max-md:px-4">
        <div className="min-w-0">
          <h1>
            <span className="num text-[26px] tracking-normal">{record.number}</span>
            {record.title ? <span className="ml-3">{record.title}</span> : null}
          </h1>
          <p className="mt-1.5 flex flex-wrap items-center gap-x-3.5 gap-y-1 text-[13px] text-muted">
            <StatusMark status={record.status} voided={record.void !== null} />
            <span>{momentText(record.createdAt)}</span>
            <span>kept by {keeperText(record.createdBy)}</span>
            {record.tags.map((tag) => (
              <Link
                prefetch={false}
                key={tag}
                href={`${paths.records}?tag=${encodeURIComponent(tag)}`}
                className="rounded border border-rule bg-sheet px-1.5 text-ink hover:border-ink"
              >
                {tag}
              </Link>
            ))}
          </p>
        </div>
        <RecordActions record={record} labels={labels} mayVoid={mayVoid} />
      </div>
      {record.void ? (
        <p className="mb-4 border-l-[3px] border-fault bg-sheet px-4 py-3">
          <strong className="text-fault">Void.</strong> {record.void.reason}
          <span className="block text-[13px] text-muted">
            {record.void.by.name}, {momentText(record.void.at)}
          </span>
        </p>
      ) : null}
      {revision.state === "issued" ? null : (
        <p className="mb-4 border-l-[3px] border-ink bg-sheet px-4 py-3">
          This record was made with revision {record.revision}, which is now {revision.state}.
        </p>
      )}
      <div className="grid border border-rule bg-sheet max-md:border-x-0 md:grid-cols-[minmax(340px,428px)_minmax(0,1fr)]">
        <InputsTable record={record} definition={definition} materialNames={materials.names} />
        <section className="min-w-0" aria-label="Results and limits">
          {section ? (
            <div className="border-b border-rule px-6 pb-1.5 pt-3.5 max-md:px-2">
              <SectionStrip
                model={section}
                description={`Section through ${section.layers.length} ${section.layers.length === 1 ? "layer" : "layers"}, to scale, with the temperature of each face above it.`}
              />
            </div>
          ) : null}
          <div className="grid lg:grid-cols-[1.35fr_1fr]">
            <RecordResults record={record} definition={definition} />
            <LimitsPane definition={definition} evaluation={record} stale={false} />
          </div>
        </section>
      </div>
      <WorkingTable rows={typesetWorking(definition)} evaluation={record} stale={false} />
      {record.note ? (
        <section className="border border-t-0 border-rule bg-sheet px-6 py-4 max-md:border-x-0 max-md:px-4">
          <h2 className="mb-1">Note</h2>
          <p className="max-w-prose whitespace-pre-wrap">{record.note}</p>
        </section>
      ) : null}
      <TitleBlock
        owner={works.name}
        ownerNote={works.demo ? "Demonstration data" : undefined}
        title={record.title || definition.title}
        documentType="Calculation record"
        revision={`${record.template}, ${record.revision}`}
        dateOfIssue={record.createdAt.slice(0, 10)}
        people={[
          ["Prepared by", keeperText(record.createdBy)],
          ["Template issued by", revision.issuedBy?.name ?? "\u2013"],
        ]}
        identification={record.number}
        extra={["Engine", record.engine]}
      />
      <dl className="mt-3 grid gap-x-3 text-[12px] text-muted max-md:px-4 md:grid-cols-[max-content_1fr]">
        <dt>Definition</dt>
        <dd className="num break-all">{record.definitionHash}</dd>
        <dt>Digest of the record</dt>
        <dd className="num break-all">{record.digest}</dd>
        {record.materials.length > 0 ? (
          <>
            <dt>Materials</dt>
            <dd>
              {record.materials.map((material, index) => (
                <span key={material.slug}>
                  {index > 0 ? ", " : ""}
                  <Link
                    prefetch={false}
                    href={paths.material(material.slug)}
                    className="underline decoration-rule underline-offset-[3px]"
                  >
                    {material.slug}
                  </Link>
                  , revision {material.revision}
                </span>
              ))}
            </dd>
          </>
        ) : null}
      </dl>
    </main>
  );
}

/** Names and classes of the materials that a record used, in the revisions that it used. */
async function materialsOf(actor: PersonActor, record: RecordView) {
  const used = await Promise.all(
    record.materials.map(async (material) => {
      const { definition } = await getMaterialRevision(actor, material);
      return { slug: material.slug, name: definition.name, class: definition.class };
    }),
  );
  return {
    names: Object.fromEntries(used.map((material) => [material.slug, material.name])),
    classes: Object.fromEntries(used.map((material) => [material.slug, material.class])),
  };
}
