"use server";

import { CodedError } from "@/lib/core/errors";
import { setUpFirstPerson } from "@/lib/people/set-up-first-person";

export interface SetUpState {
  done: boolean;
  problem: string | null;
  faults: Record<string, string>;
}

/** Makes the first person from the set-up form. Refusals come back as sentences at their fields. */
export async function setUp(_previous: SetUpState, form: FormData): Promise<SetUpState> {
  const text = (name: string) => {
    const value = form.get(name);
    return typeof value === "string" ? value : "";
  };
  try {
    await setUpFirstPerson({
      code: text("code"),
      email: text("email"),
      name: text("name"),
      password: text("password"),
    });
    return { done: true, problem: null, faults: {} };
  } catch (error) {
    if (!(error instanceof CodedError)) throw error;
    const faults = Object.fromEntries(
      error.problems.map((problem) => [problem.pointer.replace("#/", ""), problem.message]),
    );
    return { done: false, problem: error.problems.length === 0 ? error.message : null, faults };
  }
}
