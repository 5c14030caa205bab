import type { Metadata } from "next";
import { orNotFound, requireActor } from "@/app/_components/require-actor";
import { getRecord } from "@/lib/records/get-record";
import { RecordNumber } from "@/lib/records/schemas";
import { getTemplateRevision } from "@/lib/templates/get-template";
import { notFound } from "next/navigation";
import { RecordReport } from "./_components/record-report";

interface Props {
  params: Promise<{ number: string }>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: (await params).number };
}

export default async function RecordPage({ params }: Props) {
  const actor = await requireActor();
  const number = RecordNumber.safeParse((await params).number);
  if (!number.success) notFound();
  const record = await orNotFound(getRecord(actor, { number: number.data }));
  const revision = await orNotFound(
    getTemplateRevision(actor, { slug: record.template, revision: record.revision }),
  );
  return <RecordReport actor={actor} record={record} revision={revision} />;
}
