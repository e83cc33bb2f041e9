/** What figures rest on, in sentences below them. */
export function Assumptions({ sentences }: { sentences: readonly string[] }) {
  return (
    <ul className="m-0 mt-2 list-none p-0 text-caption text-ink-2">
      {sentences.map((sentence) => (
        <li key={sentence} className="text-pretty">
          {sentence}
        </li>
      ))}
    </ul>
  );
}
