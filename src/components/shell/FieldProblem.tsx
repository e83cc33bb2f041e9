/** What is wrong with a field, announced when it appears. */
export function FieldProblem({ id, words }: { id: string; words: string | undefined }) {
  return (
    <p id={id} role="alert" className="field-problem text-caption empty:hidden">
      {words}
    </p>
  );
}
