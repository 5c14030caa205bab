import Link from "next/link";
import { Markdown } from "@/app/_components/markdown";
import { StateMark } from "@/app/_components/state-mark";
import { dayText } from "@/app/_components/time-text";
import { TitleBlock } from "@/app/_components/title-block";
import type { PersonActor } from "@/lib/access/actor";
import { paths } from "@/lib/core/paths";
import { installation } from "@/lib/people/installation";
import type { RevisionView } from "@/lib/templates/schemas";
import { categoryNames } from "../../_components/category-names";
import { materialChoices } from "../material-choices";
import { typesetWorking } from "@/app/_components/run/typeset";
import type { FormValues } from "./form-state";
import { RunDesk } from "./run-desk";

interface Props {
  actor: PersonActor;
  view: RevisionView;
  /** Whether it is the revision that a call by slug runs. */
  current: boolean;
  initial?: FormValues;
}

/** A revision of a template as people run it. */
export async function TemplateView({ actor, view, current, initial }: Props) {
  const works = await installation();
  const { definition } = view;
  const runs = view.state === "issued" || view.state === "superseded";
  const people = [
    ["Originator", view.originators.map((person) => person.name).join(", ") || "\u2013"],
    ["Checked and issued by", view.checkedBy?.name ?? "\u2013"],
  ] as const;

  return (
    <main
      id="main"
      tabIndex={-1}
      className="mx-auto max-w-page px-8 pb-12 pt-6 outline-none max-md:px-0 max-md:pb-24 max-md:pt-4"
    >
      <nav aria-label="Where this is" className="text-[13px] text-muted max-md:px-4">
        <Link prefetch={false} href={paths.templates} className="hover:text-ink">
          Templates
        </Link>
        {" · "}
        <Link
          prefetch={false}
          href={`${paths.templates}?category=${definition.category}`}
          className="hover:text-ink"
        >
          {categoryNames[definition.category]}
        </Link>
      </nav>
      {runs ? (
        <RunDesk
          slug={view.template}
          revision={view.revision}
          current={current}
          definition={definition}
          working={typesetWorking(definition)}
          materials={await materialChoices(actor, definition)}
          mayKeep={actor.role !== "reader"}
          initial={initial}
          header={<Heading view={view} />}
          footer={<About view={view} />}
        />
      ) : (
        <>
          <div className="mb-5 max-md:px-4">
            <Heading view={view} />
            {view.state === "withdrawn" ? (
              <p className="mt-4 border-l-[3px] border-fault pl-3">
                This revision was withdrawn and does not run any more.{" "}
                {view.withdrawnReason ? `Reason: ${view.withdrawnReason}` : ""}
              </p>
            ) : null}
          </div>
          <About view={view} />
        </>
      )}
      <TitleBlock
        owner={works.name}
        ownerNote={works.demo ? "Demonstration data" : undefined}
        title={definition.title}
        documentType="Calculation template"
        revision={view.revision}
        dateOfIssue={view.issuedAt ? view.issuedAt.slice(0, 10) : "\u2013"}
        people={people}
        identification={view.template}
        extra={["Worked cases", String(definition.cases.length)]}
      />
      <p className="mt-3 text-[12px] text-muted max-md:px-4">
        Calculations support engineering judgement; local codes and licensed practice govern. Definition{" "}
        <span className="num break-all">{view.definitionHash.slice(0, 16)}</span>
      </p>
    </main>
  );
}

/** Title, state and dates. */
function Heading({ view }: { view: RevisionView }) {
  return (
    <div className="min-w-0 max-md:w-full">
      <h1>{view.definition.title}</h1>
      <p className="mt-1.5 flex flex-wrap gap-x-3.5 gap-y-1 text-[13px] text-muted">
        <StateMark state={view.state} revision={view.revision} />
        {view.issuedAt ? <span>{dayText(view.issuedAt)}</span> : null}
        {view.verifyBy ? <span>verify again by {dayText(view.verifyBy)}</span> : null}
        {view.supplied && !view.adopted ? <span>supplied, not yet adopted here</span> : null}
        {view.withdrawalDate ? <span>ends on {dayText(view.withdrawalDate)}</span> : null}
      </p>
    </div>
  );
}

/** What the method answers, where it stops being valid, and what it rests on. */
function About({ view }: { view: RevisionView }) {
  const { definition } = view;
  return (
    <section
      className="grid gap-x-12 gap-y-6 border border-t-0 border-rule bg-sheet px-6 pb-6 pt-5 max-md:border-x-0 max-md:px-4 lg:grid-cols-2"
      aria-label="About this template"
    >
      <div>
        <h2 className="mb-2">About</h2>
        <Markdown text={definition.summary} />
        {definition.method ? <p className="mt-3 text-muted">{definition.method}</p> : null}
      </div>
      <div className="grid content-start gap-6">
        <div>
          <h2 className="mb-2">References</h2>
          <ul className="grid gap-1">
            {definition.references.map((reference) => (
              <li key={reference.text}>
                {reference.text}
                {reference.edition ? <span className="text-muted">, {reference.edition}</span> : null}
              </li>
            ))}
          </ul>
        </div>
        <div>
          <h2 className="mb-2">
            Worked cases <small>run again before every issue</small>
          </h2>
          <ul className="grid gap-1.5">
            {definition.cases.map((entry) => (
              <li key={entry.title}>
                {entry.title}
                <span className="block text-[13px] text-muted">
                  {entry.basis}: {entry.source}
                </span>
              </li>
            ))}
          </ul>
        </div>
      </div>
    </section>
  );
}
