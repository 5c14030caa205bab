import Link from "next/link";
import { StateMark } from "@/app/_components/state-mark";
import { SymbolText } from "@/app/_components/symbol";
import { dayText } from "@/app/_components/time-text";
import { TitleBlock } from "@/app/_components/title-block";
import type { Property } from "@/lib/calculation/material";
import { propertyCurve } from "@/lib/calculation/property-curve";
import { paths } from "@/lib/core/paths";
import type { MaterialRevisionView } from "@/lib/materials/schemas";
import { installation } from "@/lib/people/installation";
import type { PropertyName } from "@/lib/language";
import { classNames, propertyLabels } from "../../_components/class-names";
import { PropertyPlot } from "./property-plot";

/** A material: what it is, its properties over their valid range, and where each number comes from. */
export async function MaterialSheet({ view }: { view: MaterialRevisionView }) {
  const works = await installation();
  const { definition } = view;
  const properties = Object.entries(definition.properties) as [PropertyName, Property][];
  return (
    <main
      id="main"
      tabIndex={-1}
      className="mx-auto max-w-page px-8 pb-12 pt-6 outline-none max-md:px-0 max-md:pt-4"
    >
      <nav aria-label="Where this is" className="text-[13px] text-muted max-md:px-4">
        <Link href={paths.materials} className="hover:text-ink">
          Materials
        </Link>
        {" · "}
        <Link href={`${paths.materials}?class=${definition.class}`} className="hover:text-ink">
          {classNames[definition.class]}
        </Link>
      </nav>
      <div className="mb-5 max-md:px-4">
        <h1>{definition.name}</h1>
        <p className="mt-1.5 flex flex-wrap gap-x-3.5 gap-y-1 text-[13px] text-muted">
          <StateMark state={view.state} revision={view.revision} />
          {view.issuedAt ? <span>{dayText(view.issuedAt)}</span> : null}
          {view.supplied && !view.adopted ? <span>supplied, not yet adopted here</span> : null}
        </p>
      </div>
      <section
        className="grid gap-x-12 gap-y-4 border border-rule bg-sheet px-6 py-5 max-md:border-x-0 max-md:px-4 md:grid-cols-2"
        aria-label="Condition and limits of use"
      >
        <div>
          <h2 className="mb-1">Condition</h2>
          <p>{definition.condition || "not stated"}</p>
          {definition.note ? <p className="mt-2 text-muted">{definition.note}</p> : null}
        </div>
        <div>
          <h2 className="mb-1">Limits of use</h2>
          {definition.service ? (
            <>
              <p className="num">
                {definition.service.min
                  ? `from ${definition.service.min.value} ${definition.service.min.unit} `
                  : ""}
                {definition.service.max
                  ? `up to ${definition.service.max.value} ${definition.service.max.unit}`
                  : ""}
              </p>
              <p className="mt-1 text-muted">
                {definition.service.note} A face beyond it breaks a stop limit of the run.
              </p>
            </>
          ) : (
            <p className="text-muted">
              No service temperature is stated. The valid range of each property still holds.
            </p>
          )}
        </div>
      </section>
      {properties.map(([name, property]) => (
        <PropertySection key={name} view={view} name={name} property={property} />
      ))}
      <TitleBlock
        owner={works.name}
        ownerNote={works.demo ? "Demonstration data" : undefined}
        title={definition.name}
        documentType="Material data"
        revision={view.revision}
        dateOfIssue={view.issuedAt ? view.issuedAt.slice(0, 10) : "\u2013"}
        people={[
          ["Originator", view.originators.map((person) => person.name).join(", ") || "\u2013"],
          ["Checked and issued by", view.checkedBy?.name ?? "\u2013"],
        ]}
        identification={view.material}
        extra={["Properties", String(properties.length)]}
      />
    </main>
  );
}

function uncertaintyText(property: Property): string {
  const { uncertainty } = property;
  if (!uncertainty) return "not stated";
  const size =
    uncertainty.relative !== undefined
      ? `${uncertainty.relative * 100} %`
      : `${uncertainty.absolute ?? "?"} ${property.unit}`;
  const kind = {
    standard: "standard uncertainty",
    expanded95: "expanded, 95 %",
    unstated: "kind not stated",
  }[uncertainty.kind];
  return `${size}, ${kind}`;
}

function PropertySection({
  view,
  name,
  property,
}: {
  view: MaterialRevisionView;
  name: PropertyName;
  property: Property;
}) {
  const curve = propertyCurve(view.definition, name, 121);
  const range = `${property.pieces[0]?.range.min} to ${property.pieces.at(-1)?.range.max} ${property.argumentUnit}`;
  return (
    <section
      className="grid border border-t-0 border-rule bg-sheet max-md:border-x-0 lg:grid-cols-[minmax(0,1fr)_360px]"
      aria-label={propertyLabels[name]}
    >
      <div className="min-w-0 px-6 pb-3 pt-4 max-md:px-4">
        <h2 className="mb-2">
          <SymbolText symbol={name} /> <span className="ml-2">{propertyLabels[name]}</span>
        </h2>
        <PropertyPlot
          label={propertyLabels[name] ?? name}
          points={curve.points}
          unit={property.unit}
          argumentUnit={property.argumentUnit}
          relativeUncertainty={property.uncertainty?.relative ?? null}
        />
      </div>
      <dl className="grid content-start gap-y-2 border-rule px-6 pb-5 pt-4 text-[13px] max-lg:border-t max-md:px-4 lg:border-l [&_dt]:text-muted">
        <div>
          <dt>Valid range</dt>
          <dd className="num">{range}</dd>
        </div>
        <div>
          <dt>Form</dt>
          <dd>{[...new Set(property.pieces.map((piece) => formWords[piece.form]))].join(", ")}</dd>
        </div>
        <div>
          <dt>Uncertainty</dt>
          <dd>{uncertaintyText(property)}</dd>
        </div>
        <div>
          <dt>Source</dt>
          <dd>{property.source}</dd>
        </div>
        <div>
          <dt>Basis and status</dt>
          <dd>
            {property.basis}, {property.status}
          </dd>
          {property.basis === "from memory" ? (
            <dd className="mt-1 font-[550]">Confirm before design use.</dd>
          ) : null}
        </div>
      </dl>
    </section>
  );
}

const formWords: Record<Property["pieces"][number]["form"], string> = {
  constant: "constant",
  polynomial: "polynomial",
  "log10-polynomial": "polynomial of logarithms",
  "log10-ratio": "ratio of polynomials of logarithms",
  table: "table",
  working: "working of its own",
};
