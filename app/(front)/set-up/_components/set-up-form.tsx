"use client";

import { useActionState } from "react";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { TextField } from "@/app/_components/ui/text-field";
import { paths } from "@/lib/core/paths";
import { setUp } from "../actions";

/** Makes the first person of an installation. */
export function SetUpForm() {
  const [state, action, busy] = useActionState(setUp, {
    done: false,
    problem: null,
    faults: {},
    typed: { code: "", name: "", email: "" },
  });
  if (state.done) {
    return (
      <div className="mt-5">
        <p className="mb-4">The account is made. Sign in with it.</p>
        <ButtonLink href={paths.signIn} tone="main">
          Sign in
        </ButtonLink>
      </div>
    );
  }
  return (
    <form action={action} className="mt-5">
      <TextField
        label="Set-up code"
        name="code"
        defaultValue={state.typed.code}
        required
        maxLength={64}
        autoComplete="off"
        className="num"
        fault={state.faults.code}
      />
      <TextField
        label="Your name"
        name="name"
        defaultValue={state.typed.name}
        required
        maxLength={120}
        autoComplete="name"
        fault={state.faults.name}
      />
      <TextField
        label="Mail address"
        name="email"
        defaultValue={state.typed.email}
        type="email"
        required
        maxLength={254}
        autoComplete="username"
        fault={state.faults.email}
      />
      <TextField
        label="Password"
        name="password"
        type="password"
        required
        maxLength={1024}
        autoComplete="new-password"
        hint="At least 15 characters. A sentence is easier to keep in mind than signs."
        fault={state.faults.password}
      />
      <p role="alert" className="min-h-5 text-fault">
        {state.problem}
      </p>
      <Button tone="main" type="submit" disabled={busy} className="mt-2 w-full">
        {busy ? "Making the account …" : "Make the first account"}
      </Button>
    </form>
  );
}
