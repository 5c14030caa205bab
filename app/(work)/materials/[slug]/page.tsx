import type { Metadata } from "next";
import { orNotFound, requireActor } from "@/app/_components/require-actor";
import { getMaterial } from "@/lib/materials/get-material";
import { MaterialSheet } from "./_components/material-sheet";

interface Props {
  params: Promise<{ slug: string }>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const actor = await requireActor();
  const material = await orNotFound(getMaterial(actor, await params));
  return { title: material.current.definition.name };
}

export default async function MaterialPage({ params }: Props) {
  const actor = await requireActor();
  const material = await orNotFound(getMaterial(actor, await params));
  return <MaterialSheet view={material.current} />;
}
