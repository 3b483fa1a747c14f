/** What to beware of, where it belongs. */
export function Cautions({ cautions }: { readonly cautions: readonly string[] }) {
  if (cautions.length === 0) return null;
  return (
    <div class="reading-cautions" role="note" aria-label="Cautions">
      <h3>{cautions.length === 1 ? "Caution" : "Cautions"}</h3>
      <ul>
        {cautions.map((text) => (
          <li key={text}>{text}</li>
        ))}
      </ul>
    </div>
  );
}
