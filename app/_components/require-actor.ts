import "server-only";
import { headers } from "next/headers";
import { notFound, redirect } from "next/navigation";
import type { PersonActor } from "@/lib/access/actor";
import { currentActor } from "@/lib/access/current-actor";
import { CodedError } from "@/lib/core/errors";
import { paths } from "@/lib/core/paths";

/** Who looks at this page; without a session the way leads to the sign-in page and back. */
export async function requireActor(): Promise<PersonActor> {
  const actor = await currentActor();
  if (actor) return actor;
  const here = (await headers()).get("x-pathname") ?? "/";
  redirect(here === "/" ? paths.signIn : `${paths.signIn}?callbackUrl=${encodeURIComponent(here)}`);
}

/** What a verb answers; what is not there, or not for this person to see, becomes the page that says so. */
export async function orNotFound<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (error instanceof CodedError && error.code === "not-found") notFound();
    throw error;
  }
}
