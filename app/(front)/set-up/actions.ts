"use server";

import { CodedError } from "@/lib/core/errors";
import { setUpFirstPerson } from "@/lib/people/set-up-first-person";

export interface SetUpState {
  done: boolean;
  problem: string | null;
  faults: Record<string, string>;
  /** What was typed, but for the password, so that a refusal does not empty the form. */
  typed: { code: string; name: string; email: string };
}

/** Makes the first person from the set-up form. Refusals come back as sentences at their fields. */
export async function setUp(_previous: SetUpState, form: FormData): Promise<SetUpState> {
  const text = (name: string) => {
    const value = form.get(name);
    return typeof value === "string" ? value : "";
  };
  const typed = { code: text("code"), name: text("name"), email: text("email") };
  try {
    await setUpFirstPerson({
      ...typed,
      password: text("password"),
    });
    return { done: true, problem: null, faults: {}, typed };
  } catch (error) {
    if (!(error instanceof CodedError)) throw error;
    const faults = Object.fromEntries(
      error.problems.map((problem) => [problem.pointer.replace("#/", ""), problem.message]),
    );
    return { done: false, problem: error.problems.length === 0 ? error.message : null, faults, typed };
  }
}
