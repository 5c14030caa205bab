export default function Page() {
  return (
    <main className="p-8">
      <h1>Coldface</h1>
    </main>
  );
}
