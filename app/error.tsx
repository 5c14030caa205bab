"use client";

import { Button } from "./_components/ui/button";

/** What a page says when something on our side failed: nothing of the inside, and a way on. */
export default function ErrorPage({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return (
    <main id="main" className="mx-auto max-w-page px-8 py-16 max-md:px-4">
      <h1>An error on our side</h1>
      <p className="mt-2 max-w-prose text-muted">
        This page could not be made. Nothing that was kept is lost.{" "}
        {error.digest ? `Mention ${error.digest} when you report it.` : ""}
      </p>
      <div className="mt-4">
        <Button tone="main" onClick={reset}>
          Try again
        </Button>
      </div>
    </main>
  );
}
