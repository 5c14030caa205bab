import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { PageFrame, Sheet } from "@/app/_components/page-frame";
import { errorCodes, type ErrorCode } from "@/lib/core/errors";
import { explanations } from "./explanations";

interface Props {
  params: Promise<{ code: string }>;
}

async function codeOf({ params }: Props): Promise<ErrorCode | null> {
  const { code } = await params;
  return Object.hasOwn(errorCodes, code) ? (code as ErrorCode) : null;
}

export async function generateMetadata(props: Props): Promise<Metadata> {
  const code = await codeOf(props);
  return { title: code === null ? "Unknown problem" : errorCodes[code].title };
}

/** Where the `type` of a problem document leads. Open to everybody, like the codes themselves. */
export default async function ProblemPage(props: Props) {
  const code = await codeOf(props);
  if (code === null) notFound();
  const { meaning, mend } = explanations[code];
  return (
    <PageFrame
      crumb="Problems of the interface"
      title={errorCodes[code].title}
      meta={
        <span className="num">
          {code}, HTTP {errorCodes[code].status}
        </span>
      }
    >
      <Sheet className="px-6 py-5 max-md:px-4">
        <dl className="max-w-prose space-y-4">
          <div>
            <dt className="font-[620]">What it means</dt>
            <dd>{meaning}</dd>
          </div>
          <div>
            <dt className="font-[620]">How to mend it</dt>
            <dd>{mend}</dd>
          </div>
        </dl>
      </Sheet>
    </PageFrame>
  );
}
