export default function HomePage() {
  return (
    <main className="p-8">
      <h1>Hilum</h1>
    </main>
  );
}
