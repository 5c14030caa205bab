import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { currentActor } from "@/lib/access/current-actor";
import { sameOriginUrl } from "@/lib/access/same-origin-url";
import { env } from "@/lib/core/env";
import { paths } from "@/lib/core/paths";
import { needsFirstPerson } from "@/lib/people/set-up-first-person";
import { SignInForm } from "./_components/sign-in-form";

export const metadata: Metadata = { title: "Sign in" };

export default async function SignInPage({
  searchParams,
}: {
  searchParams: Promise<{ callbackUrl?: string | string[] }>;
}) {
  if (await needsFirstPerson()) redirect(paths.setUp);
  const { callbackUrl } = await searchParams;
  const url = new URL(sameOriginUrl(typeof callbackUrl === "string" ? callbackUrl : "/", env().PUBLIC_URL));
  const target = url.pathname + url.search;
  if (await currentActor()) redirect(target);
  return (
    <>
      <h1 className="text-[24px] leading-[30px]">Sign in</h1>
      <SignInForm target={target} />
    </>
  );
}
