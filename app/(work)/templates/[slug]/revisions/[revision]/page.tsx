import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { orNotFound, requireActor } from "@/app/_components/require-actor";
import { getTemplateRevision } from "@/lib/templates/get-template";
import { TemplateView } from "../../_components/template-view";

interface Props {
  params: Promise<{ slug: string; revision: string }>;
}

async function load({ params }: Props) {
  const actor = await requireActor();
  const { slug, revision } = await params;
  const number = Number(revision);
  if (!Number.isInteger(number) || number < 1) notFound();
  return { actor, view: await orNotFound(getTemplateRevision(actor, { slug, revision: number })) };
}

export async function generateMetadata(props: Props): Promise<Metadata> {
  const { view } = await load(props);
  return { title: `${view.definition.title}, revision ${view.revision}` };
}

export default async function RevisionPage(props: Props) {
  const { actor, view } = await load(props);
  return <TemplateView actor={actor} view={view} current={view.state === "issued"} />;
}
