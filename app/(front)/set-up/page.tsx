import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { paths } from "@/lib/core/paths";
import { needsFirstPerson } from "@/lib/people/set-up-first-person";
import { SetUpForm } from "./_components/set-up-form";

export const metadata: Metadata = { title: "Set up" };

export default async function SetUpPage() {
  if (!(await needsFirstPerson())) redirect(paths.signIn);
  return (
    <>
      <h1 className="text-[24px] leading-[30px]">Set up Coldface</h1>
      <p className="mt-2 text-muted">
        You make the first account: a senior engineer who is also the administrator. The set-up code stands in
        the log of the server.
      </p>
      <SetUpForm />
    </>
  );
}
