import type { Metadata } from "next";
import { PageFrame } from "@/app/_components/page-frame";
import { requireActor } from "@/app/_components/require-actor";
import { paths } from "@/lib/core/paths";
import { ReferenceViewer } from "./_components/reference-viewer";

export const metadata: Metadata = { title: "Reference of the interface" };

export default async function ReferencePage() {
  await requireActor();
  return (
    <PageFrame
      title="Reference of the interface"
      meta={<span className="text-muted">Calls made here use your session, with your rights.</span>}
    >
      <ReferenceViewer address={paths.api("/openapi.json")} />
    </PageFrame>
  );
}
