import Link from "next/link";

export default function NotFound() {
  return (
    <main id="main" className="mx-auto max-w-page px-8 py-16 max-md:px-4">
      <h1>Nothing is here</h1>
      <p className="mt-2 max-w-prose text-muted">
        The address is not known, or what it names is not for you to see. Check the number or the name.
      </p>
      <p className="mt-4">
        <Link href="/" className="underline">
          To the home page
        </Link>
      </p>
    </main>
  );
}
