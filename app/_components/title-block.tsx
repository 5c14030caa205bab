import type { ReactNode } from "react";

/**
 * Title block after the data fields of ISO 7200: legal owner, title, document type, revision, date of issue,
 * originator, approval, identification, sheet. It stands at the foot of every template, record and sheet.
 */
export interface TitleBlockFields {
  owner: string;
  ownerNote?: string;
  title: string;
  documentType: string;
  revision: ReactNode;
  dateOfIssue: string;
  /** The two people's fields, as label and name. */
  people: readonly [readonly [string, string], readonly [string, string]];
  identification: string;
  extra: readonly [string, string];
  sheet?: string;
}

function Cell({
  label,
  children,
  className = "",
}: {
  label: string;
  children: ReactNode;
  className?: string;
}) {
  return (
    <div className={`min-w-0 border-l border-t border-rule px-2.5 pb-[7px] pt-[5px] ${className}`}>
      <dt className="text-[11px] leading-[14px] text-muted [font-stretch:90%]">{label}</dt>
      <dd className="break-words text-sm leading-[18px]">{children}</dd>
    </div>
  );
}

export function TitleBlock(fields: TitleBlockFields) {
  const [first, second] = fields.people;
  return (
    <dl
      aria-label="Title block"
      className="mt-5 grid grid-cols-2 overflow-hidden border-2 border-ink bg-sheet max-md:mx-4 md:grid-cols-[1.1fr_1.1fr_1fr_.75fr_.7fr_.9fr] [&>div]:-ml-px [&>div]:-mt-px"
    >
      <div className="col-span-2 flex min-w-0 flex-col justify-between border-l border-t border-rule px-2.5 pb-[7px] pt-[5px] md:col-span-1 md:row-span-2">
        <dt className="text-[11px] leading-[14px] text-muted [font-stretch:90%]">Legal owner</dt>
        <dd className="expanded break-words text-sm font-[620]">{fields.owner}</dd>
        <dd className="text-[11px] leading-[14px] text-muted">{fields.ownerNote ?? "\u00a0"}</dd>
      </div>
      <Cell label="Title" className="col-span-2">
        <span className="font-[620] [font-stretch:108%]">{fields.title}</span>
      </Cell>
      <Cell label="Document type">{fields.documentType}</Cell>
      <Cell label="Revision">
        <span className="num">{fields.revision}</span>
      </Cell>
      <Cell label="Date of issue">
        <span className="num">{fields.dateOfIssue}</span>
      </Cell>
      <Cell label={first[0]}>{first[1]}</Cell>
      <Cell label={second[0]}>{second[1]}</Cell>
      <Cell label="Identification">
        <span className="num">{fields.identification}</span>
      </Cell>
      <Cell label={fields.extra[0]}>
        <span className="num">{fields.extra[1]}</span>
      </Cell>
      <Cell label="Sheet">
        <span className="num">{fields.sheet ?? "1 of 1"}</span>
      </Cell>
    </dl>
  );
}
