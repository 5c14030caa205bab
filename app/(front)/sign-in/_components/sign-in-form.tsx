"use client";

import { signIn } from "next-auth/react";
import { useRouter } from "next/navigation";
import { useState, type FormEvent } from "react";
import { Button } from "@/app/_components/ui/button";
import { TextField } from "@/app/_components/ui/text-field";

const sentences: Record<string, string> = {
  CredentialsSignin: "Mail address and password do not match an account that may sign in.",
  TooManyAttempts: "Too many attempts for this account. Wait a quarter of an hour and try again.",
  Unavailable: "Sign-in is not possible at this moment. Try again shortly.",
};

/** Sign-in with mail address and password. What went wrong is said without telling which of the two it was. */
export function SignInForm({ target }: { target: string }) {
  const router = useRouter();
  const [problem, setProblem] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const data = new FormData(event.currentTarget);
    setBusy(true);
    setProblem(null);
    try {
      const reply = await signIn("credentials", {
        email: data.get("email"),
        password: data.get("password"),
        redirect: false,
        callbackUrl: target,
      });
      if (reply?.ok && !reply.error) {
        router.replace(target);
        router.refresh();
        return;
      }
      setProblem(sentences[reply?.error ?? ""] ?? sentences.CredentialsSignin ?? null);
    } catch {
      setProblem("The server did not answer. Check the connection and try again.");
    }
    setBusy(false);
  };

  return (
    <form onSubmit={(event) => void submit(event)} className="mt-5">
      <TextField
        label="Mail address"
        name="email"
        type="email"
        autoComplete="username"
        required
        maxLength={254}
        autoFocus
      />
      <TextField
        label="Password"
        name="password"
        type="password"
        autoComplete="current-password"
        required
        maxLength={256}
      />
      <p role="alert" className="min-h-5 text-fault">
        {problem}
      </p>
      <Button tone="main" type="submit" disabled={busy} className="mt-2 w-full">
        {busy ? "Signing in …" : "Sign in"}
      </Button>
    </form>
  );
}
