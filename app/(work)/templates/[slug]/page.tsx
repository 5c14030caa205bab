import type { Metadata } from "next";
import { orNotFound, requireActor } from "@/app/_components/require-actor";
import { formFromRecord } from "./form-from-record";
import { TemplateView } from "./_components/template-view";
import { getTemplate } from "@/lib/templates/get-template";

interface Props {
  params: Promise<{ slug: string }>;
  searchParams: Promise<{ record?: string | string[] }>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const actor = await requireActor();
  const template = await orNotFound(getTemplate(actor, await params));
  return { title: template.current.definition.title };
}

export default async function TemplatePage({ params, searchParams }: Props) {
  const actor = await requireActor();
  const { record } = await searchParams;
  const template = await orNotFound(getTemplate(actor, await params));
  const initial =
    typeof record === "string" ? await formFromRecord(actor, template.current, record) : undefined;
  return (
    <TemplateView
      actor={actor}
      view={template.current}
      current={template.current.state === "issued"}
      initial={initial}
    />
  );
}
